import { describe, expect, it } from 'vitest'
import { fit, type FitRequest, type FitResult, type ParameterOptions } from '#shared/science/fitting'
import { models } from '#shared/science/models'

const xs = [0, 0.05, 0.1, 0.2, 0.3, 0.4, 0.6, 0.8, 1, 1.25, 1.5]
const points = xs.map((x, i) => ({ x, y: 31 - 4 * x + 16 * x / (1 + 4.5 * x) + 0.03 * Math.sin(11 * i) }))
const fitWith = (parameters: Record<string, ParameterOptions>, more: Partial<FitRequest> = {}) => fit({ model: 'linear-langmuir', points, parameters, ...more })
const parameter = (result: FitResult, name: string) => result.parameters.find(item => item.name === name)!

/** S at given constants, straight from the definition. */
function sumAt(values: Record<string, number>, model: FitRequest['model'] = 'linear-langmuir') {
  const { parameters, value } = models[model as 'linear-langmuir']
  const p = parameters.map(({ name }) => values[name]!)
  return points.reduce((sum, { x, y }) => sum + (y - value(p, x)) ** 2, 0)
}

describe('a fixed parameter', () => {
  it.each(['T0', 'c', 'Bmax', 'K'])('leaves the rest at their optimum when %s is fixed there', (name) => {
    const free = fitWith({})
    const held = fitWith({ [name]: { fixed: parameter(free, name).estimate! } })
    for (const { name: other, estimate } of free.parameters) expect(parameter(held, other).estimate!).toBeCloseTo(estimate!, 6)
    expect(held.degreesOfFreedom).toBe(free.degreesOfFreedom + 1)
    expect(held.covariance).toHaveLength(3)
    expect(parameter(held, name)).toMatchObject({ fixed: true, standardError: null, interval: null })
  })
})

describe('a bound', () => {
  it('that does not bite changes nothing', () => {
    const free = fitWith({})
    const bounded = fitWith({ K: { min: 0, max: 100 }, Bmax: { min: -50, max: 50 }, c: { max: 10 } })
    free.parameters.forEach(({ estimate, standardError, interval }, j) => {
      const other = bounded.parameters[j]!
      expect(other.estimate!).toBeCloseTo(estimate!, 8)
      expect(other.standardError!).toBeCloseTo(standardError!, 8)
      expect(other.interval!.lower!).toBeCloseTo(interval!.lower!, 5)
      expect(other.interval!.upper!).toBeCloseTo(interval!.upper!, 5)
    })
  })

  it.each<[string, ParameterOptions, number]>([['K', { max: 3 }, 3], ['Bmax', { max: 3 }, 3], ['c', { min: -3 }, -3], ['T0', { min: 31.1 }, 31.1]])('on %s that bites holds it there, says so and gives a one-sided interval', (name, options, bound) => {
    const result = fitWith({ [name]: options })
    const held = fitWith({ [name]: { fixed: bound } })
    expect(result.stopReason).toBe('bound')
    expect(parameter(result, name)).toMatchObject({ estimate: expect.closeTo(bound, 10), standardError: null })
    expect(result.residualSumOfSquares).toBeCloseTo(held.residualSumOfSquares, 10)
    expect(result.notes.find(({ code }) => code === 'parameter-at-bound')?.values.parameter).toBe(name)
    const { lower, upper } = parameter(result, name).interval!
    expect(options.max === undefined ? lower : upper).toBeCloseTo(bound, 10)
    expect(options.max === undefined ? upper! > bound : lower! < bound).toBe(true)
  })

  it('on two parameters at once is the best point of the whole box', () => {
    const result = fitWith({ K: { max: 3 }, Bmax: { max: 3 } })
    const values = Object.fromEntries(result.parameters.map(({ name, estimate }) => [name, estimate!]))
    for (const [name, estimate] of Object.entries(values)) {
      for (const change of [-1e-4, 1e-4]) {
        const isOutside = (name === 'K' || name === 'Bmax') && estimate + change > 3
        if (!isOutside) expect(sumAt({ ...values, [name]: estimate + change })).toBeGreaterThan(result.residualSumOfSquares)
      }
    }
  })
})

describe('intervals', () => {
  it('end where S, fitted again with the constant held, reaches the threshold', () => {
    const result = fitWith({})
    const threshold = result.residualSumOfSquares * (1 + 2.364624251592784 ** 2 / 7)
    for (const { name, interval } of result.parameters) {
      for (const end of [interval!.lower!, interval!.upper!]) {
        expect(fitWith({ [name]: { fixed: end } }).residualSumOfSquares / threshold).toBeCloseTo(1, 6)
      }
    }
  })

  it('by t are symmetrical about the estimate', () => {
    for (const { estimate, standardError, interval } of fitWith({}, { intervals: 't' }).parameters) {
      expect(interval!.method).toBe('t')
      expect(interval!.upper! - estimate!).toBeCloseTo(2.364624251592784 * standardError!, 9)
      expect(estimate! - interval!.lower!).toBeCloseTo(2.364624251592784 * standardError!, 9)
    }
  })

  it('widen with the level', () => {
    const width = (confidence: number) => {
      const { lower, upper } = parameter(fitWith({}, { confidence }), 'K').interval!
      return upper! - lower!
    }
    expect(width(0.99)).toBeGreaterThan(width(0.95))
    expect(width(0.95)).toBeGreaterThan(width(0.68))
  })
})

describe('linear-hill', () => {
  const steep = xs.map((x, i) => ({ x, y: 31 - 4 * x + 6 * (4 * x) ** 2 / (1 + (4 * x) ** 2) + 0.01 * Math.sin(11 * i) }))

  it('finds cooperative binding', () => {
    const result = fit({ model: 'linear-hill', points: steep })
    expect(result.stopReason).toBe('relative-offset')
    expect(parameter(result, 'h').estimate!).toBeCloseTo(2, 1)
    expect(parameter(result, 'K').estimate!).toBeCloseTo(4, 1)
    expect(parameter(result, 'h').interval!.lower!).toBeGreaterThan(1.5)
  })

  it('is linear-langmuir when h is fixed at 1', () => {
    const hill = fit({ model: 'linear-hill', points, parameters: { h: { fixed: 1 } } })
    fitWith({}).parameters.forEach(({ estimate }, j) => expect(hill.parameters[j]!.estimate!).toBeCloseTo(estimate!, 8))
  })
})
