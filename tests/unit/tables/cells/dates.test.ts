import { describe, expect, it } from 'vitest'
import { dayOfSerial, numbersBehindDate, orderOf, readDate } from '#shared/tables/cells/dates'

describe('readDate', () => {
  it.each([
    '2026-03-04', '2026/03/04', '04.03.2026', '4.3.26', '04-03-2026', '4 March 2026', '4. März 2026', '4 mars 2026', '4 de marzo de 2026', '4. mars 2026', 'March 4, 2026', '2026-03-04T10:33:00', '04.03.2026 10:33',
  ])('reads %s', (text) => {
    expect(readDate(text, 'day-month-year')).toBe('2026-03-04')
  })

  it('follows the order of its column', () => {
    expect(readDate('03/04/2026', 'month-day-year')).toBe('2026-03-04')
    expect(readDate('26-03-04', 'year-month-day')).toBe('2026-03-04')
  })

  it.each(['31.02.2026', '2026-13-01', '0.5.2026', 'soon', '31.2', ''])('takes %s for no day', (text) => {
    expect(readDate(text, 'day-month-year')).toBeNull()
  })
})

describe('orderOf', () => {
  it.each<[string[], string, boolean]>([
    [['04.03.2026'], 'day-month-year', true],
    [['04/03/2026'], 'day-month-year', false],
    [['04/03/2026', '14/03/2026'], 'day-month-year', true],
    [['03/14/2026', '03/04/2026'], 'month-day-year', true],
    [['2026-03-04'], 'year-month-day', true],
    [[''], 'day-month-year', true],
  ])('knows of %j that it is %s, clear: %s', (texts, order, isClear) => {
    expect(orderOf(texts)).toEqual({ order, isClear })
  })
})

describe('dates that were numbers', () => {
  it('gives back what may have been typed', () => {
    expect(numbersBehindDate('31. Mrz')).toEqual(['31.03', '31.3'])
    expect(numbersBehindDate('29-Dec')).toContain('29.12')
    expect(numbersBehindDate('2026-03-31')).toEqual(['31.03', '31.3'])
    expect(numbersBehindDate('1931-12-01')).toContain('12.31')
    expect(numbersBehindDate('31.2')).toEqual([])
  })

  it('knows the day behind a serial number, and no day behind a temperature', () => {
    expect(dayOfSerial(46085)).toBe('2026-03-04')
    expect(dayOfSerial(46085.5)).toBe('2026-03-04')
    expect(dayOfSerial(31.2)).toBeNull()
  })
})
