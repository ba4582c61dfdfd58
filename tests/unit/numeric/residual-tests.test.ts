import { describe, expect, it } from 'vitest'
import { fewRuns } from '#shared/science/numeric/runs'
import { shapiroWilk } from '#shared/science/numeric/shapiro-wilk'

describe('shapiroWilk', () => {
  /** Source: scipy.stats.shapiro 1.17.1, computed for this test; the first sample is that of Shapiro & Wilk (1965). */
  it.each([
    [[148, 154, 158, 160, 161, 162, 166, 170, 182, 195, 236], 0.7888146948631716, 0.006703814061898823],
    [[2.1, 3.4, 1.9, 5.6, 7.7, 2.2, 3.1, 8.8, 4.4, 6.1, 3.3, 2.8, 9.9, 4, 5.2], 0.9042851123034642, 0.11067675216244244],
  ])('agrees with an independent program', (values, w, probability) => {
    const found = shapiroWilk(values)!
    expect(found.w).toBeCloseTo(w, 6)
    expect(found.probability).toBeCloseTo(probability, 6)
  })

  it('says nothing of equal or too few values', () => {
    expect(shapiroWilk([1, 1, 1, 1, 1, 1, 1, 1])).toBeNull()
    expect(shapiroWilk([1, 2, 3])).toBeNull()
  })
})

describe('fewRuns', () => {
  it('counts every arrangement of three above and three below', () => {
    // Twenty arrangements: two with 2 runs, four with 3 (by hand).
    expect(fewRuns([1, 1, 1, -1, -1, -1])!.probability).toBeCloseTo(2 / 20, 12)
    expect(fewRuns([1, 1, -1, -1, -1, 1])!.probability).toBeCloseTo(6 / 20, 12)
    expect(fewRuns([1, -1, 1, -1, 1, -1])!.probability).toBeCloseTo(1, 12)
  })

  it('leaves zeros out and says nothing where all signs are equal', () => {
    expect(fewRuns([1, 0, 1])).toBeNull()
    expect(fewRuns([1, 0, -1])).toMatchObject({ runs: 2 })
  })
})
