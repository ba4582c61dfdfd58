import { describe, expect, it } from 'vitest'
import { axisOver, concentrationAxis, niceStep, residualAxis, temperatureAxis } from '~~/components/chart/figure/axis'

describe('axisOver', () => {
  it('keeps the ends and puts ticks at round numbers inside', () => {
    expect(axisOver(29.6, 32.9, 6)).toEqual({ min: 29.6, max: 32.9, ticks: [30, 31, 32], decimals: 0 })
  })

  it('prints as many decimals as tell the ticks apart', () => {
    expect(axisOver(0, 0.05, 5)).toMatchObject({ ticks: [0, 0.01, 0.02, 0.03, 0.04, 0.05], decimals: 2 })
  })

  it.each([[1, 5, 0.2], [0.9, 6, 0.2], [33, 6, 10], [0.036, 6, 0.01]])('steps a span of %d in at most %d parts by %d', (span, most, step) => {
    expect(niceStep(span, most)).toBeCloseTo(step, 12)
  })
})

describe('concentrationAxis', () => {
  it('ends at the last reading where that is a round number', () => {
    expect(concentrationAxis([0, 0.3, 1], 6).max).toBe(1)
  })

  it('leaves at most half a step beyond the last reading', () => {
    expect(concentrationAxis([0, 0.36], 6).max).toBeCloseTo(0.4, 12)
  })

  it.each([[[]], [[0, 0]]])('shows 0 to 1 M when no salt has been read: %j', (xs) => {
    expect(concentrationAxis(xs, 6)).toMatchObject({ min: 0, max: 1 })
  })
})

describe('temperatureAxis', () => {
  it('leaves more room above the readings of a system that clouds on heating', () => {
    const { min, max } = temperatureAxis([30, 32], 'on-heating', 6)
    expect(max - 32).toBeGreaterThan(30 - min)
  })

  it('leaves more room below when the system clouds on cooling', () => {
    const { min, max } = temperatureAxis([30, 32], 'on-cooling', 6)
    expect(30 - min).toBeGreaterThan(max - 32)
  })

  it('still has a span when all readings are equal', () => {
    const { min, max, ticks } = temperatureAxis([31, 31], 'on-heating', 6)
    expect(max).toBeGreaterThan(min)
    expect(ticks.length).toBeGreaterThan(0)
  })
})

describe('residualAxis', () => {
  it('is symmetric and holds every residual', () => {
    const axis = residualAxis([0.03, -0.05])
    expect(axis.min).toBe(-axis.max)
    expect(axis.max).toBeGreaterThan(0.05)
  })

  it('does not blow up what is only rounding', () => {
    expect(residualAxis([1e-15, -3e-16]).limit).toBe(0.01)
  })

  it('has a span without residuals', () => {
    expect(residualAxis([]).max).toBeGreaterThan(0)
  })
})
