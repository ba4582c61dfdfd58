/**
 * Source: twelve synthetic series of known truth, fitted with scipy 1.10.1 and refined in 40-digit arithmetic (mpmath);
 * see data/fits/README.md.
 */
import { describe, expect, it } from 'vitest'
import { compareModels, fit, type FitRequest, type FitResult } from '#shared/science/fitting'
import { fewestDigits, readReference } from './data'

interface Solved {
  parameters: string[]
  estimates20: string[]
  rss20: string
  s: number
  dof: number
  standardErrors: number[]
  covariance: number[][]
  standardErrorsAbsoluteSigma?: number[]
  covarianceAbsoluteSigma?: number[][]
  aicc: number | null
  ci95Profile: Record<string, [number | null, number | null]>
}

interface Case {
  id: string
  x: number[]
  y: number[]
  sigma: number[] | null
  fit: {
    linear: Solved
    langmuir: Solved | null
    profile: { globalOptimum: 'interior' | 'K->0' | 'K->inf', rssKto0: number, rssKtoInf: number | null }
    derived?: Record<string, { value: number, se: number } | null>
    fTest?: { p: number }
  }
}

const estimateDigits = 8
const standardErrorDigits = 6
/** The reference stops its search for an end at 10⁷ standard errors or at the edge of its range of K. */
const profileDigits = 5
const edgeOfSearch = 1e3

const { cases } = readReference<{ cases: Case[] }>('fits/cases.json')
const determined = cases.filter(({ fit }) => fit.profile.globalOptimum === 'interior')
const undetermined = cases.filter(({ fit }) => fit.profile.globalOptimum !== 'interior')
const weighted = determined.filter(({ sigma }) => sigma)

function requestOf({ x, y, sigma }: Case, options: Partial<FitRequest> = {}): FitRequest {
  return { model: 'linear-langmuir', points: x.map((value, i) => ({ x: value, y: y[i]!, ...(sigma && { sd: sigma[i]! }) })), ...options }
}

function expectAgreement(result: FitResult, solved: Solved) {
  expect(fewestDigits(result.parameters.map(({ estimate }) => estimate), solved.estimates20)).toBeGreaterThanOrEqual(estimateDigits)
  expect(fewestDigits(result.parameters.map(({ standardError }) => standardError), solved.standardErrors)).toBeGreaterThanOrEqual(standardErrorDigits)
  expect(fewestDigits(result.covariance!.flat(), solved.covariance.flat())).toBeGreaterThanOrEqual(standardErrorDigits)
  expect(fewestDigits([result.residualSumOfSquares, result.residualStandardDeviation], [solved.rss20, solved.s])).toBeGreaterThanOrEqual(estimateDigits)
  if (solved.aicc === null) expect(result.aicc).toBeNull()
  else expect(fewestDigits([result.aicc], [solved.aicc])).toBeGreaterThanOrEqual(standardErrorDigits)
}

describe('fit, against the 40-digit reference fits', () => {
  it.each(cases)('agrees with the straight line of $id', (reference) => {
    expectAgreement(fit(requestOf(reference, { model: 'linear' })), reference.fit.linear)
  })

  it.each(determined)('agrees with the constants of $id', (reference) => {
    const result = fit(requestOf(reference))
    expect(result.stopReason).toBe('relative-offset')
    expectAgreement(result, reference.fit.langmuir!)
  })

  it.each(undetermined)('finds no finite optimum in $id and says at which end', (reference) => {
    const result = fit(requestOf(reference))
    const { globalOptimum, rssKto0, rssKtoInf } = reference.fit.profile
    const isZero = globalOptimum === 'K->0'
    expect(result.stopReason).toBe('no-finite-optimum')
    expect(result.parameters.find(({ name }) => name === 'K')!.estimate).toBeNull()
    expect(result.notes.find(({ code }) => code === 'binding-not-identified')?.values.end).toBe(isZero ? 'zero' : 'infinity')
    expect(fewestDigits([result.residualSumOfSquares], [isZero ? rssKto0 : rssKtoInf!])).toBeGreaterThanOrEqual(estimateDigits)
  })

  it.each(determined)('draws the profile intervals of $id', (reference) => {
    const result = fit(requestOf(reference))
    for (const { name, interval, estimate } of result.parameters) {
      reference.fit.langmuir!.ci95Profile[name]!.forEach((end, side) => {
        const found = side === 0 ? interval!.lower : interval!.upper
        const isOpen = end === null || Math.abs(end) > edgeOfSearch * Math.abs(estimate!)
        if (name === 'K' && end === null) expect(found).toBeNull()
        else if (!isOpen && found !== null) expect(fewestDigits([found], [end])).toBeGreaterThanOrEqual(profileDigits)
      })
    }
  })

  it.each(determined.filter(({ id }) => id !== 'near-flat' && id !== 'outlier'))('leaves no end of $id open', (reference) => {
    for (const { interval } of fit(requestOf(reference)).parameters) {
      expect(interval!.lower).not.toBeNull()
      expect(interval!.upper).not.toBeNull()
    }
  })

  it.each(determined)('agrees with the derived quantities of $id', (reference) => {
    const { derived } = fit(requestOf(reference))
    const found = new Map(derived.map(quantity => [quantity.name, quantity]))
    const names = { Kd: 'Kd', initialSlope: 'initialSlope', extremumConcentration: /^(maximum|minimum)Concentration$/, crossoverConcentration: 'crossoverConcentration' }
    for (const [theirs, ours] of Object.entries(names)) {
      const expected = reference.fit.derived![theirs]
      const match = [...found.values()].find(({ name }) => typeof ours === 'string' ? name === ours : ours.test(name))
      if (!expected) expect(match).toBeUndefined()
      else {
        expect(fewestDigits([match!.estimate], [expected.value])).toBeGreaterThanOrEqual(estimateDigits)
        expect(fewestDigits([match!.standardError], [expected.se])).toBeGreaterThanOrEqual(standardErrorDigits)
      }
    }
  })

  it.each(weighted)('takes the sds of $id as absolute when asked to', (reference) => {
    const result = fit(requestOf(reference, { sdMeaning: 'absolute' }))
    const { standardErrorsAbsoluteSigma, covarianceAbsoluteSigma } = reference.fit.langmuir!
    expect(fewestDigits(result.parameters.map(({ standardError }) => standardError), standardErrorsAbsoluteSigma!)).toBeGreaterThanOrEqual(standardErrorDigits)
    expect(fewestDigits(result.covariance!.flat(), covarianceAbsoluteSigma!.flat())).toBeGreaterThanOrEqual(standardErrorDigits)
  })

  it.each(determined.filter(({ fit }) => fit.fTest))('tests the binding term of $id as nested models', (reference) => {
    const { model: _, ...request } = requestOf(reference)
    const { probability } = compareModels(request)
    expect(probability!).toBeCloseTo(reference.fit.fTest!.p, 10)
  })
})
