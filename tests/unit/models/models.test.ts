import { describe, expect, it } from 'vitest'
import { models, type Model } from '#shared/science/models'

const somewhere: Record<string, number[]> = {
  'linear': [31, -4],
  'langmuir': [31, 3.5, 4.5],
  'linear-langmuir': [31, -4, 3.5, 4.5],
  'linear-quadratic': [31, 4, -3],
  'linear-hill': [31, -4, 3.5, 4.5, 1.4],
}
const cases = Object.values(models).map(model => ({ name: model.name, model, p: somewhere[model.name]! }))
const step = 1e-6

function bumped(p: number[], j: number, by: number) {
  return p.map((value, i) => i === j ? value + by * Math.abs(value) : value)
}

function slopeOf(f: (p: number[]) => number, p: number[], j: number) {
  return (f(bumped(p, j, step)) - f(bumped(p, j, -step))) / (2 * step * Math.abs(p[j]!))
}

function gradientOf(model: Model, p: number[], x: number) {
  const out = new Float64Array(p.length)
  model.gradient(p, x, out, 0, 1)
  return [...out]
}

describe.each(cases)('the model $name', ({ model, p }) => {
  it.each([0, 0.05, 0.4, 1.5])('has the gradient of its value at x = %f', (x) => {
    gradientOf(model, p, x).forEach((slope, j) => expect(slope).toBeCloseTo(slopeOf(q => model.value(q, x), p, j), 6))
  })

  it('starts at T0', () => {
    expect(model.value(p, 0)).toBe(31)
  })

  it('has the gradients of its derived quantities', () => {
    for (const { name, gradient } of model.derived(p)) {
      const again = (q: number[]) => model.derived(q).find(quantity => quantity.name === name)!.value
      gradient.forEach((slope, j) => expect(slope).toBeCloseTo(slopeOf(again, p, j), 5))
    }
  })
})

describe('closed forms of linear-langmuir', () => {
  const model = models['linear-langmuir']
  const derived = (p: number[]) => new Map(model.derived(p).map(({ name, value }) => [name, value]))

  it('put the maximum where the curve turns', () => {
    const p = [31, -4, 3.5, 4.5]
    const at = derived(p).get('maximumConcentration')!
    expect(model.value(p, at)).toBeGreaterThan(Math.max(model.value(p, at * 0.99), model.value(p, at * 1.01)))
    expect(model.value(p, at) - 31).toBeCloseTo(derived(p).get('maximumShift')!, 12)
  })

  it('put the crossover where the curve comes back to T0', () => {
    const p = [31, -4, 3.5, 4.5]
    expect(model.value(p, derived(p).get('crossoverConcentration')!)).toBeCloseTo(31, 12)
  })

  it('call the turn of a lowered curve a minimum', () => {
    const p = [31, 4, -3.5, 4.5]
    const at = derived(p).get('minimumConcentration')!
    expect(model.value(p, at) - 31).toBeCloseTo(derived(p).get('minimumShift')!, 12)
    expect(derived(p).has('maximumConcentration')).toBe(false)
  })

  it('name no turn where there is none', () => {
    expect([...derived([31, -4, -3.5, 4.5]).keys()]).toEqual(['Kd', 'initialSlope', 'BmaxK'])
    expect([...derived([31, -20, 3.5, 4.5]).keys()]).toEqual(['Kd', 'initialSlope', 'BmaxK'])
  })
})
