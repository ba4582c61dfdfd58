import { describe, expect, it } from 'vitest'
import { celsiusOfFahrenheit, celsiusOfKelvin, decimalOf, decimalOfDouble, kelvinOfFahrenheitStep, movePoint, spreadOf, typed } from '#shared/tables/cells/decimal'

describe('conversions', () => {
  it.each([['50', 0.05], ['1', 0.001], ['0.7', 0.0007], ['1500.5', 1.5005], ['35', 0.035], ['5e1', 0.05]])('makes %s mmol the double of its digits', (text, value) => {
    expect(movePoint(decimalOf(text), -3).value).toBe(value)
  })

  it.each([['305.01', 31.86], ['304.3', 31.15], ['273.15', 0], ['300', 26.85], ['318.155', 45.005], ['272.1', -1.05]])('subtracts 273.15 from %s K without dust', (text, value) => {
    expect(celsiusOfKelvin(decimalOf(text)).value).toBe(value)
  })

  it.each([['88.7', 31.5], ['32', 0], ['88.75', 31.528], ['86', 30]])('gives %s °F one digit more than it has', (text, value) => {
    expect(celsiusOfFahrenheit(decimalOf(text)).value).toBe(value)
  })

  it('scales a difference in °F by five ninths', () => {
    expect(kelvinOfFahrenheitStep(decimalOf('0.9')).value).toBe(0.5)
    expect(kelvinOfFahrenheitStep(decimalOf('0.2')).value).toBe(0.11)
  })

  it('keeps a double of a spreadsheet as it is and converts it without its dust', () => {
    expect(decimalOfDouble(31.860000000000014).value).toBe(31.860000000000014)
    expect(celsiusOfKelvin(decimalOfDouble(305.01000000000005)).value).toBe(31.86)
    expect(movePoint(decimalOfDouble(50.00000000000001), -3).value).toBe(0.05)
  })
})

describe('spreadOf', () => {
  it('has no dust in the mean and none in the spread of equal values', () => {
    expect(spreadOf(['31.0', '31.1', '31.2'].map(decimalOf))).toMatchObject({ mean: { value: 31.1 }, n: 3 })
    expect(spreadOf(['31.1', '31.1', '31.1'].map(decimalOf))).toMatchObject({ mean: { value: 31.1 }, sd: 0 })
  })

  it('divides by n − 1 and knows no spread of one value', () => {
    expect(spreadOf(['1', '3'].map(decimalOf)).sd).toBeCloseTo(Math.SQRT2, 12)
    expect(spreadOf([decimalOf('31.1')])).toMatchObject({ mean: { value: 31.1 }, sd: null, n: 1 })
  })
})

describe('typed', () => {
  it('writes digits where a person would', () => {
    expect(typed(movePoint(decimalOf('50'), -3))).toBe('0.050')
    expect(typed(decimalOf('31.86'))).toBe('31.86')
  })
})
