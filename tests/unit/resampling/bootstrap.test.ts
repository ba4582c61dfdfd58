import { describe, expect, it } from 'vitest'
import { ScienceError } from '#shared/science/errors'
import { fit } from '#shared/science/fitting'
import { seededRandom } from '#shared/science/random'
import { Bootstrap, bootstrap } from '#shared/science/resampling/bootstrap'
import { acceleration, bcaEnds, percentileEnds, quantileOf } from '#shared/science/resampling/intervals'
import { bootstrapKinds } from '#shared/science/resampling/resamples'

const binding = (x: number) => 31 - 4 * x + 3.85 * 4.6 * x / (1 + 4.6 * x)
const ladder = [0, 0, 0, 0.02, 0.05, 0.08, 0.12, 0.16, 0.2, 0.25, 0.3, 0.4, 0.5, 0.6, 0.8, 1]
const noisy = (curve: (x: number) => number, xs: readonly number[], sd: number, seed = 7) => {
  const random = seededRandom(seed)
  return xs.map(x => ({ x, y: curve(x) + sd * random.normal() }))
}
const request = { model: 'linear-langmuir', points: noisy(binding, ladder, 0.03) } as const
const line = { model: 'linear', points: noisy(x => 31 - 9 * x, Array.from({ length: 40 }, (_, i) => i / 40), 0.1) } as const

describe('a bootstrap', () => {
  it.each(bootstrapKinds)('by %s repeats from its seed and differs with another', (kind) => {
    const run = (seed: number) => bootstrap(request, { kind, samples: 200, seed })
    expect(run(1)).toEqual(run(1))
    expect(run(1).quantities[3]!.percentile).not.toEqual(run(2).quantities[3]!.percentile)
  })

  it('is the same in portions as at once', () => {
    const options = { kind: 'residual', samples: 300, seed: 3, at: [0.1, 0.5] } as const
    const run = new Bootstrap(request, options)
    while (!run.advance(70)) expect(run.done).toBeLessThan(300)
    expect(run.result()).toEqual(bootstrap(request, options))
  })

  it('draws the same whether a band is asked for or not', () => {
    const options = { kind: 'residual', samples: 200, seed: 3 } as const
    expect(bootstrap(request, { ...options, at: [0.1] }).quantities).toEqual(bootstrap(request, options).quantities)
  })

  it.each(bootstrapKinds)('by %s gives a straight line the scatter that least squares gives it', (kind) => {
    const { quantities } = bootstrap(line, { kind, samples: 4_000, seed: 11 })
    const { parameters } = fit(line)
    quantities.filter(({ name }) => name === 'T0' || name === 'c').forEach(({ standardError }, j) => {
      // 4,000 samples know a scatter to about 1.1 %; resampling cases of 40 readings differs from the formula by some percent more.
      expect(standardError! / parameters[j]!.standardError!).toBeGreaterThan(0.88)
      expect(standardError! / parameters[j]!.standardError!).toBeLessThan(1.12)
    })
  })

  it('takes stated uncertainties at their word when they are absolute', () => {
    const points = line.points.map(point => ({ ...point, sd: 0.4 }))
    const [first] = bootstrap({ ...line, points, sdMeaning: 'absolute' }, { kind: 'parametric', samples: 3_000, seed: 5 }).quantities
    const exact = fit({ ...line, points, sdMeaning: 'absolute' }).parameters[0]!.standardError!
    expect(first!.standardError! / exact).toBeGreaterThan(0.95)
    expect(first!.standardError! / exact).toBeLessThan(1.05)
  })

  it('puts its intervals about the estimate and near those of the profile', () => {
    const { parameters } = fit(request)
    const K = bootstrap(request, { kind: 'residual', samples: 2_000, seed: 2 }).quantities.find(({ name }) => name === 'K')!
    const profile = parameters.find(({ name }) => name === 'K')!.interval!
    for (const { lower, upper } of [K.percentile, K.bca!]) {
      expect(lower!).toBeLessThan(K.estimate)
      expect(upper!).toBeGreaterThan(K.estimate)
      expect((upper! - lower!) / (profile.upper! - profile.lower!)).toBeGreaterThan(0.6)
      expect((upper! - lower!) / (profile.upper! - profile.lower!)).toBeLessThan(1.4)
    }
  })

  it('gives a new reading more room than the curve, everywhere', () => {
    const { bands } = bootstrap(request, { kind: 'residual', samples: 1_000, seed: 4, at: [0, 0.1, 0.5, 1] })
    bands!.x.forEach((x, i) => {
      expect(bands!.curve.lower[i]!).toBeLessThan(binding(x) + 0.05)
      expect(bands!.curve.upper[i]! - bands!.curve.lower[i]!).toBeLessThan(bands!.reading.upper[i]! - bands!.reading.lower[i]!)
    })
  })

  it('counts the resamples whose K runs away and leaves that end open', () => {
    const weak = { model: 'linear-langmuir', points: noisy(x => 31 - 4 * x + 1.5 * 10 * x / (1 + 10 * x), [0, 0.1, 0.3, 0.5, 0.7, 0.9, 1.1, 1.3], 0.15, 28) } as const
    const result = bootstrap(weak, { kind: 'residual', samples: 500, seed: 1 })
    expect(result.withoutOptimum).toBeGreaterThan(25)
    expect(result.quantities.find(({ name }) => name === 'K')!.percentile.upper).toBeNull()
  })

  it('refuses what it cannot do, naming everything', () => {
    const faults = (run: () => unknown) => {
      try {
        run()
      }
      catch (error) {
        if (error instanceof ScienceError) return [error.code, ...error.problems.map(({ path }) => path)]
      }
      return []
    }
    expect(faults(() => bootstrap(request, { kind: 'residual', samples: 10, seed: -1, confidence: 2 }))).toEqual(['unusable-input', 'samples', 'seed', 'confidence'])
    const straight = { model: 'linear-langmuir', points: [0, 0.1, 0.2, 0.4, 0.8, 1.2].map(x => ({ x, y: 31 - 5 * x })) } as const
    expect(faults(() => bootstrap(straight, { kind: 'case', samples: 100, seed: 1 }))[0]).toMatch(/no-finite-optimum|no-freedom/)
    expect(faults(() => bootstrap({ model: 'linear', points: [{ x: 0, y: 31 }, { x: 1, y: 27 }] }, { kind: 'residual', samples: 100, seed: 1 }))).toEqual(['no-freedom', 'points'])
  })
})

describe('intervals from sorted values', () => {
  const even = Float64Array.from({ length: 999 }, (_, i) => (i + 1) / 1000)

  it('by percentiles cut the tails', () => {
    expect(percentileEnds(even, 0.95).lower).toBeCloseTo(0.025, 12)
    expect(percentileEnds(even, 0.95).upper).toBeCloseTo(0.975, 12)
  })

  it('are open where the value at the place is infinite', () => {
    expect(quantileOf([1, 2, Infinity], 0.99)).toBeNull()
    expect(quantileOf([], 0.5)).toBeNull()
  })

  it('by BCa are those by percentiles where nothing is biased or skewed', () => {
    const { lower, upper } = bcaEnds(even, 0.5, [1, 2, 3], 0.95)!
    expect(lower).toBeCloseTo(0.025, 6)
    expect(upper).toBeCloseTo(0.975, 6)
  })

  it('by BCa move towards the long side', () => {
    const skewed = bcaEnds(even, 0.5, [-4, 1, 1, 1, 1], 0.95)!
    expect(skewed.lower).toBeGreaterThan(0.025)
    expect(bcaEnds(even, 0.4, [1, 2, 3], 0.95)!.upper).toBeLessThan(0.975)
  })

  it('by BCa do not exist where the estimate lies outside, or a left-out value is open', () => {
    expect(bcaEnds(even, 2, [1, 2], 0.95)).toBeNull()
    expect(bcaEnds(even, 0.5, [1, NaN], 0.95)).toBeNull()
  })

  it('accelerate as skewness says: for a mean, skewness/(6·√n)', () => {
    const values = [1, 2, 2, 3, 9]
    const mean = 3.4
    const leftOut = values.map(value => (mean * 5 - value) / 4)
    const [m2, m3] = [2, 3].map(power => values.reduce((sum, value) => sum + (value - mean) ** power, 0)) as [number, number]
    expect(acceleration(leftOut)).toBeCloseTo(m3 / (6 * m2 ** 1.5), 12)
  })
})
