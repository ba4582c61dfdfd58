import { describe, expect, it } from 'vitest'
import { normalDistribution, normalQuantile, studentQuantile, upperTailOfChiSquare, upperTailOfF } from '#shared/science/numeric/distributions'

/** Source of every expected value here: scipy.stats 1.17.1, computed for these tests. */
const relative = 1e-10

function expectClose(value: number, reference: number) {
  expect(Math.abs(value / reference - 1)).toBeLessThan(relative)
}

describe('studentQuantile', () => {
  it.each([[1, 12.706204736174694], [2, 4.302652729749462], [8, 2.306004135204166], [30, 2.0422724563012378]])('gives the two-sided 95 % point for %d degrees of freedom', (freedom, expected) => {
    expectClose(studentQuantile(0.975, freedom), expected)
  })

  it('reaches far into the tail, on both sides', () => {
    expectClose(studentQuantile(0.9995, 3), 12.923978636687961)
    expect(studentQuantile(0.0005, 3)).toBe(-studentQuantile(0.9995, 3))
    expect(studentQuantile(0.5, 3)).toBe(0)
  })
})

describe('normal distribution', () => {
  it('agrees with its quantiles', () => {
    expectClose(normalQuantile(0.975), 1.959963984540054)
    expectClose(normalQuantile(1e-6), -4.753424308822899)
    expectClose(normalDistribution(1.2), 0.8849303297782918)
  })
})

describe('upper tails', () => {
  it('of F agree, near the middle and far out', () => {
    expectClose(upperTailOfF(4.2, 2, 8), 0.0566219152999847)
    expectClose(upperTailOfF(3105.1531341716086, 2, 8), 2.7395013219301463e-12)
    expect(upperTailOfF(0, 2, 8)).toBe(1)
  })

  it('of χ² agree on both sides of the mean', () => {
    expectClose(upperTailOfChiSquare(7.3, 4), 0.12085874882121235)
    expectClose(upperTailOfChiSquare(120, 100), 0.08440668109369177)
  })
})
