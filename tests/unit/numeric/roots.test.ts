import { describe, expect, it } from 'vitest'
import { findRoot, maximize } from '#shared/science/numeric/roots'

describe('findRoot', () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    ['a cubic', x => x ** 3 - 2, 0, 3, Math.cbrt(2)],
    ['a steep step', x => Math.atan(1e6 * (x - 0.7)), 0, 1, 0.7],
    ['a flat crossing', x => (x - 1) ** 5, 0, 3, 1],
    ['a root at an end', x => x, 0, 1, 0],
  ])('finds the root of %s', (_, f, from, to, root) => {
    expect(findRoot(f, from, to, f(from), f(to), 1e-13)).toBeCloseTo(root, 3)
  })

  it('reaches the digits asked for on a simple root', () => {
    const f = (x: number) => Math.cos(x) - x
    expect(Math.abs(f(findRoot(f, 0, 1, f(0), f(1), 1e-14)))).toBeLessThan(1e-14)
  })
})

describe('maximize', () => {
  it('finds the top of a smooth hill', () => {
    const top = maximize(x => -((x - 0.3) ** 2) + 5, -1, 2, 1e-9)
    expect(top.at).toBeCloseTo(0.3, 7)
    expect(top.value).toBeCloseTo(5, 12)
  })

  it('ends at the edge when the function rises towards it', () => {
    expect(maximize(x => x, 0, 1, 1e-9).at).toBeCloseTo(1, 6)
  })
})
