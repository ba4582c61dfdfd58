import { describe, expect, it } from 'vitest'
import { readQuantity } from '#shared/tables/cells/quantity'

const valueOf = (text: string, decimal: '.' | ',' | 'both' = 'both', mayGroup = false) => {
  const reading = readQuantity(text, decimal, mayGroup)
  return reading.kind === 'number' ? reading.number.value : reading.kind
}

describe('readQuantity', () => {
  it.each<[string, number]>([
    ['31.2', 31.2], ['31,2', 31.2], ['+31.2', 31.2], ['-0.1', -0.1], ['−0.1', -0.1], ['.5', 0.5], [',5', 0.5], ['1e-3', 0.001], ['1,5E2', 150], ['2 × 10^-3', 0.002],
    ['\u00A031.2\u202F', 31.2], ['1.234,5', 1234.5], ['1,234.5', 1234.5], ['1 234,5', 1234.5], ['1\u202F234', 1234], ['1\'234.5', 1234.5], ['1,234,567', 1234567], ['0.1000000000000000055', 0.1],
  ])('reads %s as the very double %d', (text, value) => {
    expect(valueOf(text)).toBe(value)
  })

  it('takes 1,234 for decimals where thousands cannot be, and for thousands where points mark decimals', () => {
    expect(valueOf('1,234', '.', false)).toBe(1.234)
    expect(valueOf('1,234', '.', true)).toBe(1234)
    expect(valueOf('1.234', ',', true)).toBe(1234)
    expect(valueOf('0,234', '.', true)).toBe(0.234)
    expect(valueOf('1,2345', '.', true)).toBe(1.2345)
  })

  it.each(['1.2.3', '1,23,456', '12 34', '31.2.', '--3', '1e', '0x10', '5 apples', 'cloudy', '12:30'])('takes %s for no number', (text) => {
    expect(valueOf(text)).toBe('text')
  })

  it.each(['n.d.', 'N.D.', 'n/a', '-', '–', '—', 'nicht bestimmt', 'k.A.', 'ikke målt', 'non déterminé', 'no determinado', '#N/A', 'not observed', 'no transition', 'keine Trübung'])('knows that %s says there is no value', (text) => {
    expect(valueOf(text)).toBe('not-determined')
  })

  it.each(['=A1*2', '=SUM(A1:A9)', '+B2/3', '-B2', '@A1', '=1+2'])('does not run %s', (text) => {
    expect(valueOf(text)).toBe('formula-like')
  })

  it.each(['=0.2', '@0.2', '\'0.2'])('takes the number behind the sign of %s', (text) => {
    expect(readQuantity(text, '.', false)).toMatchObject({ number: { value: 0.2 }, isFormulaLike: true })
  })

  it.each<[string, number, number]>([
    ['31.2 ± 0.1', 31.2, 0.1], ['31,2±0,1', 31.2, 0.1], ['31.2 +/- 0.1', 31.2, 0.1], ['31.2+-0.1', 31.2, 0.1], ['31.2 °C ± 0.1 °C', 31.2, 0.1],
    ['(31.2 ± 0.1) °C', 31.2, 0.1], ['31.2 (± 0.1)', 31.2, 0.1], ['31.2(1)', 31.2, 0.1], ['31.20(12)', 31.2, 0.12], ['31,2(1)', 31.2, 0.1], ['31.2 (0.1)', 31.2, 0.1], ['31(2)', 31, 2],
  ])('reads the uncertainty that %s states', (text, value, uncertainty) => {
    expect(readQuantity(text, 'both', false)).toMatchObject({ number: { value }, uncertainty: { number: { value: uncertainty } } })
  })

  it('tells the concise notation, whose meaning is agreed, from ±', () => {
    expect(readQuantity('31.2(1)', '.', false)).toMatchObject({ uncertainty: { isConcise: true } })
    expect(readQuantity('31.2 ± 0.1', '.', false)).toMatchObject({ uncertainty: { isConcise: false } })
  })

  it.each([['<4', 'below'], ['≤ 4', 'below'], ['below 4', 'below'], ['>80', 'above'], ['über 80', 'above'], ['80', 'exact']])('reads the limit of %s', (text, limit) => {
    expect(readQuantity(text, '.', false)).toMatchObject({ kind: 'number', limit })
  })

  it.each(['~31', '≈31', 'ca. 31', 'approx. 31', 'etwa 31', '31?', '31*'])('takes %s for approximate', (text) => {
    expect(readQuantity(text, '.', false)).toMatchObject({ number: { value: 31 }, isApproximate: true })
  })

  it.each([['50 mM', 'mmol/L'], ['0.05M', 'mol/L'], ['0.05 mol L⁻¹', 'mol/L'], ['50 mmol/kg', 'mmol/kg'], ['31.2 °C', '°C'], ['304.3 K', 'K'], ['88 °F', '°F']])('reads the unit of %s', (text, name) => {
    expect(readQuantity(text, '.', false)).toMatchObject({ kind: 'number', unit: { name } })
  })
})
