import { describe, expect, it } from 'vitest'
import { readCell } from '~~/composables/sheet/cell'

describe('readCell', () => {
  it.each([
    ['30.81', 30.81], ['30,81', 30.81], ['−1.5', -1.5], [' 0.02 ', 0.02], ['1e-3', 0.001], ['.5', 0.5], ['5.', 5], ['+3', 3],
  ])('reads %j as a number', (text, value) => {
    expect(readCell(text)).toEqual({ kind: 'number', value })
  })

  it.each(['', '   ', '\u00A0'])('takes %j for empty', (text) => {
    expect(readCell(text)).toEqual({ kind: 'empty' })
  })

  it.each([
    ['30,8l', '30.81'], ['3O.2', '30.2'], ['30.8 °C', '30.8'], ['30..8', '30.8'], ['1 000', '1000'], ['1,234.5', '1234.5'], ['0.1 M', '0.1'],
  ])('offers a value for %j', (text, suggestion) => {
    expect(readCell(text)).toEqual({ kind: 'bad', suggestion })
  })

  it.each(['abc', 'NaN', 'Infinity', '1.2.3.4', '--', '1e999', '0x10'])('has no guess for %j and never takes it for a number', (text) => {
    expect(readCell(text)).toEqual({ kind: 'bad', suggestion: null })
  })
})
