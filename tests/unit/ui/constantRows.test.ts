import { describe, expect, it } from 'vitest'
import type { FittedParameter } from '#shared/science/fitting/types'
import { alignDecimals } from '~~/components/ui/alignDecimals'
import { constantRows, intervalText } from '~~/components/ui/constantRows'
import { quantitySymbol, unitMarkup } from '~~/components/ui/quantityNames'

const K: FittedParameter = {
  name: 'K', unit: 'M⁻¹', estimate: 5.0189, standardError: 0.4355, fixed: false,
  interval: { level: 0.95, lower: 4.0665, upper: 6.152, method: 'profile' },
}

describe('constantRows', () => {
  it('prints estimate and interval to the same place', () => {
    expect(constantRows([K], [])[0]).toMatchObject({ value: '5.02(44)', interval: '4.07 to 6.15' })
  })

  it('prints a dash and no interval for a constant that is not determined', () => {
    const open = { ...K, estimate: null, standardError: null }
    expect(constantRows([open], [])[0]).toMatchObject({ value: '—', interval: null })
  })

  it('says which constant was held', () => {
    expect(constantRows([{ ...K, estimate: 5, standardError: null, interval: null, fixed: true }], [])[0]?.value).toBe('5 held')
  })

  it('adds derived quantities after the fitted ones', () => {
    expect(constantRows([K], [{ name: 'BmaxK', unit: 'K M⁻¹', estimate: 18.5877, standardError: 0.8213 }]).map(row => row.value)).toEqual(['5.02(44)', '18.59(82)'])
  })
})

describe('intervalText', () => {
  const ends = { level: 0.95, method: 'profile' as const }
  it.each([
    [1, null, 'above 1.0'], [null, 2, 'below 2.0'], [-1, 2, '−1.0 to 2.0'], [null, null, null],
  ])('from %j to %j reads %j', (lower, upper, words) => {
    expect(intervalText({ ...ends, lower, upper }, 1)).toBe(words)
  })
})

describe('alignDecimals', () => {
  it('brings the decimal points into one column', () => {
    const aligned = alignDecimals(['31.006(23)', '−3.92(14)', '12(3)', '—'])
    const fromRight = aligned.slice(0, 2).map(text => text.length - text.indexOf('.'))
    expect(new Set(fromRight).size).toBe(1)
    expect(aligned[2]!.length - aligned[2]!.indexOf('(')).toBe(fromRight[0])
    expect(aligned[3]).toBe('—')
  })
})

describe('unitMarkup', () => {
  it.each([['K M⁻¹', 'K M^−1^'], ['K M⁻²', 'K M^−2^'], ['°C', '°C']])('sets %j as %j', (unit, markup) => {
    expect(unitMarkup(unit)).toBe(markup)
  })
})

describe('quantitySymbol', () => {
  it('sets an unknown parameter in italics under its own name', () => {
    expect(quantitySymbol('b2')).toBe('*b2*')
  })
})
