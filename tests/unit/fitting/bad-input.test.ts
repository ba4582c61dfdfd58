import { describe, expect, it } from 'vitest'
import { ScienceError } from '#shared/science/errors'
import { fit, type FitRequest, type Point } from '#shared/science/fitting'

const ladder: Point[] = [0, 0.1, 0.2, 0.4, 0.6, 0.8, 1, 1.2].map(x => ({ x, y: 31 - 4 * x + 12 * x / (1 + 4 * x) + 0.02 * Math.sin(40 * x) }))

function request(changes: Partial<FitRequest> = {}): FitRequest {
  return { model: 'linear-langmuir', points: ladder, ...changes }
}

/** What is wrong with a request, as path and message; empty when it is fitted. */
function problemsOf(changes: object): Record<string, string> {
  try {
    fit(request(changes as Partial<FitRequest>))
    return {}
  }
  catch (error) {
    if (!(error instanceof ScienceError)) throw error
    return Object.fromEntries(error.problems.map(({ path, message }) => [path, message]))
  }
}

function withPoint(point: object): { points: Point[] } {
  return { points: [...ladder.slice(0, 3), point as Point, ...ladder.slice(3)] }
}

describe('fit, given unusable readings', () => {
  it.each([
    ['no points', [], 'there are no points'],
    ['one point', ladder.slice(0, 1), '1 point is too few'],
    ['fewer points than parameters', ladder.slice(0, 3), '3 points are too few for 4 free parameters'],
    ['all concentrations equal', ladder.map(({ y }) => ({ x: 0.5, y })), 'all points have the same concentration'],
    ['fewer concentrations than parameters', ladder.map(({ y }, i) => ({ x: i % 3, y })), 'only 3 different concentrations'],
  ])('says what to do about %s', (_, points, message) => {
    expect(problemsOf({ points }).points).toContain(message)
  })

  it.each([
    ['text', { x: 'a lot', y: 31 }, 'points.3.x'],
    ['a number typed as text', { x: 0.3, y: '31' }, 'points.3.y'],
    ['NaN', { x: 0.3, y: NaN }, 'points.3.y'],
    ['the word NaN', { x: 0.3, y: 'NaN' }, 'points.3.y'],
    ['infinity', { x: Infinity, y: 31 }, 'points.3.x'],
    ['1e308', { x: 0.3, y: 1e308 }, 'points.3.y'],
    ['a negative concentration', { x: -0.3, y: 31 }, 'points.3.x'],
    ['a negative sd', { x: 0.3, y: 31, sd: -0.1 }, 'points.3.sd'],
    ['no samples', { x: 0.3, y: 31, n: 0 }, 'points.3.n'],
    ['half a sample', { x: 0.3, y: 31, n: 2.5 }, 'points.3.n'],
    ['a missing cloud point', { x: 0.3 }, 'points.3.y'],
    ['nothing', null, 'points.3'],
  ])('points at %s', (_, point, path) => {
    expect(Object.keys(problemsOf(withPoint(point as object)))).toEqual([path])
  })

  it('names every problem at once', () => {
    const problems = problemsOf({
      points: [{ x: NaN, y: 31 }, { x: 0.1, y: 30, sd: -1 }, { x: 0.2, y: 29, n: 0 }, ...ladder],
      parameters: { Kd: { start: 1 }, K: { min: 5, max: 2 }, T0: { fixed: 40, max: 35 } },
      sdMeaning: 'absolute', confidence: 1.2,
    })
    expect(Object.keys(problems).sort()).toEqual([
      'confidence', 'parameters.K', 'parameters.Kd', 'parameters.T0.fixed', 'points.0.x', 'points.1.sd', 'points.2.n', 'sdMeaning',
    ])
  })
})

describe('fit, given unusable options', () => {
  it.each([
    ['an unknown model', { model: 'cubic' }, 'model'],
    ['an unknown parameter', { parameters: { Kd: { start: 1 } } }, 'parameters.Kd'],
    ['contradictory bounds', { parameters: { K: { min: 5, max: 2 } } }, 'parameters.K'],
    ['a fixed value outside its bounds', { parameters: { K: { fixed: 9, max: 2 } } }, 'parameters.K.fixed'],
    ['a start outside its bounds', { parameters: { K: { start: 9, max: 2 } } }, 'parameters.K.start'],
    ['a fixed K of zero', { parameters: { K: { fixed: 0 } } }, 'parameters.K.fixed'],
    ['a bound that is not a number', { parameters: { K: { max: NaN } } }, 'parameters.K.max'],
    ['every parameter fixed', { parameters: { T0: { fixed: 31 }, c: { fixed: -4 }, Bmax: { fixed: 3 }, K: { fixed: 4 } } }, 'parameters'],
    ['absolute sds that are missing', { sdMeaning: 'absolute' }, 'sdMeaning'],
    ['sd weights without sds', { weighting: 'sd' }, 'weighting'],
    ['replicate weights without counts', { weighting: 'replicates' }, 'weighting'],
    ['a level of certainty of one', { confidence: 1 }, 'confidence'],
  ])('points at %s', (_, changes, path) => {
    expect(Object.keys(problemsOf(changes))).toEqual([path])
  })

  it('lists the readings without an sd', () => {
    expect(problemsOf({ weighting: 'sd' }).weighting).toContain('points 1, 2, 3, 4, 5 and 3 more are without one')
  })
})

describe('fit, given hard but honest readings', () => {
  const numbersOf = (value: unknown): number[] => typeof value === 'number'
    ? [value]
    : typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersOf) : []

  it.each<[string, Partial<FitRequest>]>([
    ['all cloud points equal', { points: ladder.map(({ x }) => ({ x, y: 31 })) }],
    ['a perfect line', { points: ladder.map(({ x }) => ({ x, y: 31 - 4 * x })) }],
    ['a line that leaves exactly nothing over', { model: 'linear', points: [{ x: 0, y: 31 }, { x: 0.1, y: 30.5 }, { x: 0.4, y: 29 }] }],
    ['a perfect curve', { points: ladder.map(({ x }) => ({ x, y: 31 + 8 * x / (1 + 2 * x) })) }],
    ['duplicated points', { points: [...ladder, ...ladder] }],
    ['as many points as parameters', { points: ladder.slice(0, 4) }],
    ['concentrations spread over twenty decades', { points: ladder.map(({ y }, i) => ({ x: 10 ** (i * 3 - 12), y })) }],
    ['values as large as they may be', { points: ladder.map(({ x, y }) => ({ x: x * 1e11, y: y * 1e10 })) }],
    ['an sd of zero', { points: ladder.map((point, i) => ({ ...point, sd: i === 2 ? 0 : 0.05 })) }],
    ['one sd a million times smaller', { points: ladder.map((point, i) => ({ ...point, sd: i === 2 ? 1e-8 : 0.05 })) }],
    ['5,000 points', { points: Array.from({ length: 5_000 }, (_, i) => ({ x: i / 5_000, y: 31 - i / 1_000 + Math.sin(i) / 10 })) }],
    ['cooperative binding on a line', { model: 'linear-hill', points: ladder.map(({ x }) => ({ x, y: 31 - 4 * x })) }],
    ['bounds that exclude the optimum', { parameters: { K: { max: 1 }, Bmax: { max: 1 }, c: { min: -1 } } }],
    ['Bmax fixed at zero', { parameters: { Bmax: { fixed: 0 } } }],
  ])('answers %s with finite numbers or none', (_, changes) => {
    const result = fit(request(changes))
    expect(numbersOf(result).every(Number.isFinite)).toBe(true)
    expect(result.residuals).toHaveLength(result.n)
  })

  it('gives no standard errors where no degree of freedom is left', () => {
    const result = fit(request({ points: ladder.slice(0, 4) }))
    expect(result.degreesOfFreedom).toBe(0)
    expect(result.covariance).toBeNull()
    expect(result.parameters.map(({ standardError }) => standardError)).toEqual([null, null, null, null])
    expect(result.notes.find(({ code }) => code === 'few-points')?.severity).toBe('problem')
  })

  it('makes up no binding where all cloud points are equal', () => {
    const result = fit(request({ points: ladder.map(({ x }) => ({ x, y: 31 })) }))
    expect(result.parameters.find(({ name }) => name === 'T0')!.estimate).toBeCloseTo(31, 10)
    expect(result.parameters.find(({ name }) => name === 'K')!.estimate).toBeNull()
    expect(result.notes.map(({ code }) => code)).toContain('binding-not-identified')
  })

  it('puts the resolution of the readings in place of an sd of zero and says so', () => {
    const points = ladder.map(({ x, y }, i) => ({ x, y: Math.round(100 * y) / 100, sd: i === 2 ? 0 : 0.05 }))
    const note = fit(request({ points })).notes.find(({ code }) => code === 'resolution-floor')
    expect(note?.values.floor).toBeCloseTo(0.01 / Math.sqrt(12), 12)
    expect(note?.values.reading).toBe(3)
  })
})
