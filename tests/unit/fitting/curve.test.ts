import { describe, expect, it } from 'vitest'
import { bandAt, compareModels, curveAt, fit } from '#shared/science/fitting'

const xs = [0, 0.05, 0.1, 0.2, 0.3, 0.4, 0.6, 0.8, 1, 1.25, 1.5]
const binding = xs.map((x, i) => ({ x, y: 31 - 4 * x + 16 * x / (1 + 4.5 * x) + 0.03 * Math.sin(11 * i) }))
const line = xs.map((x, i) => ({ x, y: 31 - 9 * x + 0.03 * Math.sin(11 * i) }))

describe('curveAt', () => {
  it('passes through the fitted values', () => {
    const result = fit({ model: 'linear-langmuir', points: binding })
    curveAt(result, xs)!.forEach((y, i) => expect(y).toBeCloseTo(result.residuals[i]!.fitted, 10))
  })

  it('draws the limit of a fit without a finite optimum nowhere', () => {
    const result = fit({ model: 'linear-langmuir', points: xs.map(x => ({ x, y: 31 - 9 * x })) })
    expect(curveAt(result, xs)).toBeNull()
    expect(bandAt(result, xs)).toBeNull()
  })
})

describe('bandAt', () => {
  it('is at x = 0 the t interval of T0', () => {
    const result = fit({ model: 'linear-langmuir', points: binding, intervals: 't' })
    const band = bandAt(result, [0])!
    expect(band.lower[0]).toBeCloseTo(result.parameters[0]!.interval!.lower!, 9)
    expect(band.upper[0]).toBeCloseTo(result.parameters[0]!.interval!.upper!, 9)
  })

  it('leaves a fixed parameter out of the spread', () => {
    const result = fit({ model: 'linear', points: line, parameters: { T0: { fixed: 31 } } })
    expect(bandAt(result, [0])).toEqual({ lower: [31], upper: [31] })
  })
})

describe('compareModels', () => {
  it('finds binding supported where it is plain', () => {
    const { verdict, models, deltaAicc } = compareModels({ points: binding })
    expect(verdict).toBe('supported')
    expect(deltaAicc!).toBeGreaterThan(4)
    expect(models.find(({ model }) => model === 'linear-langmuir')!.deltaAicc).toBe(0)
  })

  it('finds no evidence on a line, and says how much would have shown', () => {
    const { verdict, detectable } = compareModels({ points: line })
    expect(verdict).toBe('no-evidence')
    const enough = line.map(({ x, y }) => ({ x, y: y + 2 * detectable!.bmax * detectable!.k * x / (1 + detectable!.k * x) }))
    expect(compareModels({ points: enough }).verdict).toBe('supported')
  })

  it('keeps the question open where readings too few for AICc bend plainly', () => {
    const bent = [0, 0.05, 0.12, 0.2, 0.3, 0.5, 1].map((x, i) => ({ x, y: 31 - 4 * x + 20 * x / (1 + 5 * x) + (i % 2 ? 0.02 : -0.02) }))
    expect(compareModels({ points: bent })).toMatchObject({ verdict: 'undecided' })
  })

  it('leaves out the models the readings are too few for', () => {
    const { models, verdict } = compareModels({ points: line.slice(0, 3) })
    expect(models.map(({ model }) => model)).toEqual(['linear', 'langmuir', 'linear-quadratic'])
    expect(verdict).toBeNull()
  })
})
