/**
 * Source: data sets of statistics handbooks (Bates & Watts 1988, Davidian & Giltinan 1995, Ezekiel 1930), solved in
 * 40-digit arithmetic and by R 4.2.2; each file names its own; see data/worked-examples/README.md.
 */
import { describe, expect, it } from 'vitest'
import { fit, type FitRequest, type FitResult, type ModelName } from '#shared/science/fitting'
import { fitExpression } from '#shared/science/fitting/expression'
import { fewestDigits, readFolder } from './data'

interface Example {
  id: string
  title: string
  model: string
  parameters: string[]
  starts: number[]
  dof: number
  x: number[]
  y: number[]
  sigma?: number[]
  estimates20: string[]
  standardErrors: number[]
  covariance: number[][]
  rss: number
  s: number
  ci95Profile?: ([number | null, number | null] | null)[]
}

const estimateDigits = 8
const standardErrorDigits = 6
/** R interpolates its profiles by splines: its ends are good to a thousandth or two of the interval’s width. */
const profileShare = 2e-3
/**
 * Profiles too bent for R's splines. Their ends were computed directly with scipy 1.10.1 for this test: for each trial
 * value the other two by lstsq at each K, the best K by bounded minimization from a grid of 400, the ends by brentq.
 */
const directProfiles: Readonly<Record<string, Readonly<Record<string, readonly [number, number]>>>> = {
  'puromycin-treated-full': { T0: [-32.14103149586036, 63.31294902892253], c: [-109.35353691935191, 49.37027317416767], Bmax: [139.5904414691693, 359.53603832596815] },
  'puromycin-untreated-full': { T0: [-15.012539429171307, 60.53973205292313], c: [-86.59359587345304, 44.68019031133589], Bmax: [92.26396930808515, 267.0619996547502] },
}
const directDigits = 8

/** The named form of a worked model, and what it holds at zero. */
const named: Readonly<Record<string, { model: ModelName, parameters?: FitRequest['parameters'] }>> = {
  'y = T0 + c*x': { model: 'linear' },
  'y = T0 + Bmax*K*x/(1+K*x)': { model: 'langmuir' },
  'y = Bmax*K*x/(1+K*x)': { model: 'langmuir', parameters: { T0: { fixed: 0 } } },
  'y = T0 + c*x + Bmax*K*x/(1+K*x)': { model: 'linear-langmuir' },
}

const examples = readFolder<Example>('worked-examples')

function pointsOf({ x, y, sigma }: Example) {
  return x.map((value, i) => ({ x: value, y: y[i]!, ...(sigma && { sd: sigma[i]! }) }))
}

function expectAgreement(result: FitResult, example: Example) {
  const byName = new Map(result.parameters.map(parameter => [parameter.name, parameter]))
  const fitted = example.parameters.map(name => byName.get(name)!)
  expect(fewestDigits(fitted.map(({ estimate }) => estimate), example.estimates20)).toBeGreaterThanOrEqual(estimateDigits)
  expect(fewestDigits(fitted.map(({ standardError }) => standardError), example.standardErrors)).toBeGreaterThanOrEqual(standardErrorDigits)
  expect(fewestDigits(result.covariance!.flat(), example.covariance.flat())).toBeGreaterThanOrEqual(standardErrorDigits)
  expect(fewestDigits([result.residualSumOfSquares, result.residualStandardDeviation], [example.rss, example.s])).toBeGreaterThanOrEqual(estimateDigits)
  expect(result.degreesOfFreedom).toBe(example.dof)
  expect(result.converged).toBe(true)
  const direct = directProfiles[example.id]
  for (const [name, ends] of Object.entries(direct ?? {})) {
    const { interval } = byName.get(name)!
    expect(fewestDigits([interval!.lower, interval!.upper], ends)).toBeGreaterThanOrEqual(directDigits)
  }
  if (direct) return
  example.ci95Profile?.forEach((ends, j) => {
    const [lower, upper] = ends ?? [null, null]
    if (lower === null || upper === null) return
    const { interval } = fitted[j]!
    expect(Math.abs(interval!.lower! - lower) / (upper - lower)).toBeLessThan(profileShare)
    expect(Math.abs(interval!.upper! - upper) / (upper - lower)).toBeLessThan(profileShare)
  })
}

describe('fit, against worked examples', () => {
  it.each(examples.filter(({ model }) => model in named))('agrees on $id', (example) => {
    expectAgreement(fit({ ...named[example.model]!, points: pointsOf(example) }), example)
  })
})

describe('fitExpression, against worked examples', () => {
  it.each(examples)('agrees on $id', (example) => {
    const parameters = Object.fromEntries(example.parameters.map((name, j) => [name, { start: example.starts?.[j] ?? 1 }]))
    const model = { expression: example.model.replace('y = ', ''), variable: 'x', parameters }
    expectAgreement(fitExpression({ model, points: pointsOf(example) }), example)
  })
})
