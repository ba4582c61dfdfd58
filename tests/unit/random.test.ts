import { describe, expect, it } from 'vitest'
import { seededRandom, xoshiro128 } from '#shared/science/random'

describe('xoshiro128', () => {
  // First outputs of the authors' reference code from the state 1, 2, 3, 4 (from memory).
  it('gives the numbers of the reference code', () => {
    const next = xoshiro128([1, 2, 3, 4])
    const first = Array.from({ length: 10 }, next)
    expect(first).toEqual([11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597, 4258142804])
  })
})

describe('seededRandom', () => {
  const draw = (count: number, source: () => number) => Array.from({ length: count }, source)

  it('repeats from the same seed and not from the next', () => {
    expect(draw(5, seededRandom(7).uniform)).toEqual(draw(5, seededRandom(7).uniform))
    expect(draw(5, seededRandom(7).uniform)).not.toEqual(draw(5, seededRandom(8).uniform))
  })

  it('stays in [0, 1)', () => {
    for (const value of draw(10_000, seededRandom(1).uniform)) {
      expect(value).toBeGreaterThanOrEqual(0)
      expect(value).toBeLessThan(1)
    }
  })

  it('draws normals of mean 0 and variance 1', () => {
    const count = 40_000
    const values = draw(count, seededRandom(2).normal)
    const mean = values.reduce((sum, value) => sum + value, 0) / count
    const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / count
    // Five standard errors of a mean and of a variance of this many normals.
    expect(Math.abs(mean)).toBeLessThan(5 / Math.sqrt(count))
    expect(Math.abs(variance - 1)).toBeLessThan(5 * Math.sqrt(2 / count))
  })
})
