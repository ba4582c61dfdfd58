import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import { concentrationScale } from '#shared/science/pooling/concentration-scale'
import { pooledShift } from '#shared/science/pooling/pooled-shift'
import { fixedEffect, randomEffects } from '#shared/science/pooling/random-effects'
import { shiftAt } from '#shared/science/pooling/shift'

const binding = (x: number) => -4 * x + 4 * 5 * x / (1 + 5 * x)

describe('fixedEffect', () => {
  it('weighs by the inverse variance', () => {
    const pooled = fixedEffect([{ value: 1, standardError: 1 }, { value: 4, standardError: 0.5 }])!
    expect(pooled.value).toBeCloseTo(3.4, 12)
    expect(pooled.standardError).toBeCloseTo(Math.sqrt(1 / 5), 12)
  })

  it('gives nothing for nothing', () => {
    expect(fixedEffect([])).toBeNull()
  })
})

describe('randomEffects', () => {
  it('is the fixed effect where labs agree', () => {
    const estimates = [{ value: 2, standardError: 0.3 }, { value: 2.1, standardError: 0.3 }, { value: 1.9, standardError: 0.3 }]
    expect(randomEffects(estimates)).toMatchObject({ ...fixedEffect(estimates), betweenLabs: 0 })
  })

  it('widens where labs disagree', () => {
    // By hand: weights 100, mean 3, Q = 100·(4 + 0 + 4) = 800, C = 300 − 100 = 200, τ² = (800 − 2)/200 = 3.99.
    const pooled = randomEffects([1, 3, 5].map(value => ({ value, standardError: 0.1 })))!
    expect(pooled.value).toBeCloseTo(3, 12)
    expect(pooled.betweenLabs).toBeCloseTo(Math.sqrt(3.99), 12)
    expect(pooled.standardError).toBeCloseTo(Math.sqrt((0.01 + 3.99) / 3), 12)
  })

  it('gives one lab back as it is', () => {
    const pooled = randomEffects([{ value: 2, standardError: 0.3 }])!
    expect([pooled.value, pooled.betweenLabs]).toEqual([2, 0])
    expect(pooled.standardError).toBeCloseTo(0.3, 12)
  })
})

describe('concentrationScale', () => {
  it.each([0.6, 0.85, 1, 1.3])('finds that a line was measured with %d of its label', (scale) => {
    expect(concentrationScale(x => -12 * scale * x, x => -12 * x, 1)).toBeCloseTo(scale, 6)
  })

  it.each([0.7, 0.85, 1, 1.2])('finds the same of a curve that rises and falls: %d', (scale) => {
    expect(concentrationScale(x => binding(scale * x), binding, 1)).toBeCloseTo(scale, 6)
  })
})

describe('shiftAt', () => {
  const points = [0, 0, 0.1, 0.2, 0.3, 0.4, 0.5].map((x, index) => ({ x, y: 31 - 12 * x + (index % 2 ? 0.02 : -0.02) }))

  it('is the slope times the concentration for a line, with its error', () => {
    const line = fit({ model: 'linear', points })
    const slope = line.parameters.find(({ name }) => name === 'c')!
    const shift = shiftAt(line, 0.3)!
    expect(shift.value).toBeCloseTo(0.3 * slope.estimate!, 12)
    expect(shift.standardError).toBeCloseTo(0.3 * slope.standardError!, 12)
  })

  it('says nothing where the fit leaves a constant open', () => {
    const open = fit({ model: 'linear-langmuir', points: [0, 0.1, 0.2, 0.3, 0.4].map(x => ({ x, y: 31 - 12 * x })) })
    expect(open.parameters.some(({ estimate }) => estimate === null)).toBe(true)
    expect(shiftAt(open, 0.3)).toBeNull()
  })
})

describe('pooledShift', () => {
  it('averages the campaigns of a lab before it pools labs', () => {
    const lineOf = (slope: number) => fit({ model: 'linear', points: [0, 0.1, 0.2, 0.3, 0.4].map((x, index) => ({ x, y: 31 + slope * x + (index % 2 ? 0.01 : -0.01) })) })
    const series = [{ lab: 'A', fit: lineOf(-10) }, { lab: 'A', fit: lineOf(-10.2) }, { lab: 'B', fit: lineOf(-12) }, { lab: 'B', fit: null }]
    const pooled = pooledShift(series, 1)!
    expect(pooled.value).toBeGreaterThan(-12)
    expect(pooled.value).toBeLessThan(-10.1)
    expect(pooled.betweenLabs).toBeGreaterThan(1)
  })

  it('gives nothing where no series has a fit', () => {
    expect(pooledShift([{ lab: 'A', fit: null }], 0.3)).toBeNull()
  })
})
