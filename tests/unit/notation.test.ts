import { describe, expect, it } from 'vitest'
import { asymmetric, concise, fixed, plain } from '#shared/science/notation'

describe('concise', () => {
  it.each([
    [4.3127, 0.1849, '4.31(18)'],
    [-12.4013, 0.2861, '−12.40(29)'],
    [30.57973, 0.03791, '30.580(38)'],
    [5.0346, 0.503, '5.03(50)'],
    [5.03, 0.0996, '5.03(10)'],
    [194.224, 29.82, '194(30)'],
    [194.224, 9.98, '194(10)'],
    [-0.0004, 0.018, '0.000(18)'],
    [0.2, 3.1, '0.2(3.1)'],
  ])('writes %f with uncertainty %f as %s', (value, uncertainty, text) => {
    expect(concise(value, uncertainty)).toBe(text)
  })

  it('takes out a power of ten when two digits of the uncertainty end left of the tens', () => {
    expect(concise(1234, 560)).toBe('1.23(56) × 10³')
    expect(concise(-2.34567e8, 1.2e6)).toBe('−2.346(12) × 10⁸')
    expect(concise(5.6177717e-9, 6.1124e-9)).toBe('5.6(6.1) × 10⁻⁹')
  })

  it('writes a value without uncertainty, or with one of zero, alone', () => {
    expect(concise(31, null)).toBe('31')
    expect(concise(31.25, 0)).toBe('31.25')
  })

  it('writes a dash where there is no value', () => {
    expect(concise(null, 0.1)).toBe('—')
    expect(concise(NaN, 0.1)).toBe('—')
  })
})

describe('asymmetric', () => {
  it('writes both sides to the same place', () => {
    expect(asymmetric(4.32, 0.91, 0.38)).toBe('4.3 +0.9/−0.4')
    expect(asymmetric(-4.321, 0.124, 0.058)).toBe('−4.32 +0.12/−0.06')
  })

  it('says when a side is open', () => {
    expect(asymmetric(4.32, null, 0.38)).toBe('4.3 +∞/−0.4')
  })
})

describe('plain', () => {
  it('drops zeros that carry nothing and keeps the true minus sign', () => {
    expect(plain(-3.5)).toBe('−3.5')
    expect(plain(0)).toBe('0')
    expect(plain(123456789)).toBe('1.2346 × 10⁸')
    expect(plain(4.2e-7)).toBe('4.2 × 10⁻⁷')
  })
})

describe('fixed', () => {
  it('never writes minus zero', () => {
    expect(fixed(-0.001, 2)).toBe('0.00')
    expect(fixed(-1.005, 1)).toBe('−1.0')
  })
})
