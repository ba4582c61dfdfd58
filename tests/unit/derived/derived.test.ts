import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import { apparentEnergy } from '#shared/science/derived/energy'
import { concentrationsFor, shiftAt } from '#shared/science/derived/shifts'
import { seededRandom } from '#shared/science/random'

const [T0, c, Bmax, K] = [31, -4, 3.85, 4.6] as const
const curve = (x: number) => T0 + c * x + Bmax * K * x / (1 + K * x)
const ladder = [0, 0, 0.02, 0.05, 0.08, 0.12, 0.16, 0.2, 0.25, 0.3, 0.4, 0.5, 0.6, 0.8, 1]
const random = seededRandom(5)
const noisy = fit({ model: 'linear-langmuir', points: ladder.map(x => ({ x, y: curve(x) + 0.02 * random.normal() })) })
const exact = fit({ model: 'linear-langmuir', points: ladder.map(x => ({ x, y: curve(x) })) })
const line = fit({ model: 'linear', points: [0, 0.2, 0.4, 0.8].map(x => ({ x, y: 31 - 10 * x })) })

/** The same by fitting again with the constant of interest as a parameter would cost a model; differences in the constants do as well. */
function byDifferences(quantity: (values: readonly number[]) => number): number {
  const values = noisy.parameters.map(({ estimate }) => estimate!)
  const gradient = values.map((value, j) => {
    const h = 1e-5 * Math.max(Math.abs(value), 1e-3)
    const moved = (by: number) => quantity(values.map((one, i) => i === j ? one + by : one))
    return (moved(h) - moved(-h)) / (2 * h)
  })
  return Math.sqrt(gradient.reduce((sum, a, i) => sum + gradient.reduce((inner, b, j) => inner + a * noisy.covariance![i]![j]! * b, 0), 0))
}

describe('the shift at a concentration', () => {
  it('is the fitted curve less its level', () => {
    expect(shiftAt(exact, 0.3)!.estimate).toBeCloseTo(curve(0.3) - T0, 9)
    expect(shiftAt(exact, 0)!.estimate).toBe(0)
  })

  it('has the standard error of the full covariance', () => {
    const expected = byDifferences(([, slope, bmax, k]) => slope! * 0.3 + bmax! * k! * 0.3 / (1 + k! * 0.3))
    expect(shiftAt(noisy, 0.3)!.standardError! / expected).toBeCloseTo(1, 5)
    expect(shiftAt(noisy, 0)!.standardError).toBe(0)
  })

  it('does not exist where a constant is open', () => {
    const open = fit({ model: 'linear-langmuir', points: [0, 0.1, 0.2, 0.4, 0.8].map(x => ({ x, y: 31 - 5 * x })) })
    expect(shiftAt(open, 0.3)).toBeNull()
    expect(concentrationsFor(open, -1, 2)).toEqual([])
  })
})

describe('the concentration for a shift', () => {
  it('has both roots where the curve comes back', () => {
    const [low, high] = concentrationsFor(exact, 0.8, 5)
    for (const root of [low!, high!]) expect(curve(root.estimate) - T0).toBeCloseTo(0.8, 8)
    expect(low!.estimate).toBeLessThan(high!.estimate)
  })

  it('has one below the start and none above the highest point', () => {
    expect(concentrationsFor(exact, -1, 5)).toHaveLength(1)
    expect(concentrationsFor(exact, 2, 5)).toEqual([])
    expect(concentrationsFor(exact, -100, 5)).toEqual([])
  })

  it('keeps its digits where one root is tiny beside the other', () => {
    const [low] = concentrationsFor(exact, 1e-9, 5)
    const slope = exact.derived.find(({ name }) => name === 'initialSlope')!.estimate
    expect(low!.estimate / (1e-9 / slope)).toBeCloseTo(1, 6)
  })

  it('has the standard error of the full covariance', () => {
    const root = ([, slope, bmax, k]: readonly number[]) => {
      const [a, b] = [slope! * k!, slope! + bmax! * k! - 0.8 * k!]
      return (-b + Math.sqrt(b * b + 4 * a * 0.8)) / (2 * a)
    }
    const [low, high] = concentrationsFor(noisy, 0.8, 5)
    const values = noisy.parameters.map(({ estimate }) => estimate!)
    const one = [low!, high!].find(({ estimate }) => Math.abs(estimate - root(values)) < 1e-6)!
    expect(one.standardError! / byDifferences(root)).toBeCloseTo(1, 4)
  })

  it('is found for other models by bracketing', () => {
    expect(concentrationsFor(line, -5, 2).map(({ estimate }) => estimate)).toEqual([expect.closeTo(0.5, 9)])
    expect(concentrationsFor(line, -5, 0.4)).toEqual([])
  })
})

describe('the apparent energy', () => {
  it('is −RT ln K on the 1 M standard state', () => {
    expect(apparentEnergy(exact, 31)!.estimate).toBeCloseTo(-8.314462618e-3 * 304.15 * Math.log(K), 6)
    const [energy, k] = [apparentEnergy(noisy, 31)!, noisy.parameters[3]!]
    expect(energy.standardError!).toBeCloseTo(8.314462618e-3 * 304.15 * k.standardError! / k.estimate!, 9)
  })

  it('does not exist without a K', () => expect(apparentEnergy(line, 31)).toBeNull())
})
