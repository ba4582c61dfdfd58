import fc from 'fast-check'
import { expect } from 'vitest'
import { fit, type FitResult, type Point } from '#shared/science/fitting'
import { bruteForce } from './brute-force'
import { randomSeries } from './random-series'

/** Rounding of a sum of squares, relative to it and to that of the readings. */
const relativeRounding = 1e-9
const absoluteRounding = 1e-22
/** Constants of one series in two units may differ by the rounding of x, a small part of their own uncertainty. */
const shareOfUncertainty = 1e-6
const perThousand = 1_000

const hasEnoughPlaces = (points: Point[]) => new Set(points.map(({ x }) => x)).size >= 4

/** The engine against exhaustion on `numRuns` random series. */
export function expectNeverWorse(numRuns: number, seed: number): void {
  fc.assert(fc.property(randomSeries.filter(hasEnoughPlaces), (points) => {
    const result = fit({ model: 'linear-langmuir', points, intervals: 't' })
    const { sum, limit } = bruteForce(points)
    const scale = points.reduce((total, { y }) => total + y * y, 0)
    expect(result.residualSumOfSquares).toBeLessThanOrEqual(sum * (1 + relativeRounding) + absoluteRounding * scale)
    const isFinite = result.stopReason !== 'no-finite-optimum'
    if (isFinite) expect(result.residualSumOfSquares).toBeLessThanOrEqual(limit * (1 + relativeRounding) + absoluteRounding * scale)
    expect(result.converged).toBe(true)
  }), { numRuns, seed })
}

/** The same series with x in M and in mM: one set of constants, in two units. */
export function expectSameInBothUnits(numRuns: number, seed: number): void {
  fc.assert(fc.property(randomSeries.filter(hasEnoughPlaces), (points) => {
    const molar = fit({ model: 'linear-langmuir', points, intervals: 't' })
    const millimolar = fit({ model: 'linear-langmuir', points: points.map(({ x, y }) => ({ x: perThousand * x, y })), intervals: 't' })
    expect(millimolar.stopReason).toBe(molar.stopReason)
    expectEqualConstants(molar, millimolar)
  }), { numRuns, seed })
}

function expectEqualConstants(molar: FitResult, millimolar: FitResult): void {
  const factors: Record<string, number> = { T0: 1, Bmax: 1, c: perThousand, K: perThousand }
  molar.parameters.forEach(({ name, estimate, standardError }, j) => {
    const other = millimolar.parameters[j]!.estimate
    if (estimate === null) return expect(other).toBeNull()
    const tolerance = shareOfUncertainty * (standardError ?? Math.abs(estimate)) + 1e-9 * Math.abs(estimate)
    expect(Math.abs(other! * factors[name]! - estimate)).toBeLessThanOrEqual(tolerance)
  })
}
