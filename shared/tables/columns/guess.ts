import type { HeadedColumn } from './columns'
import { readDate } from '../cells/dates'
import { saltOf } from '../cells/salt-cache'
import type { ColumnMeaning, GridRow } from '../types'
import { middleOf, valuesOf } from './values'

const sample = 200

interface Look { index: number, share: number, middle: number | null, isSalt: boolean, isDate: boolean, isText: boolean }

function lookAt(rows: readonly GridRow[], index: number): Look {
  const texts = rows.map(row => row.cells[index]?.text.trim() ?? '').filter(text => text !== '')
  const { numbers, withUnit } = valuesOf(rows, index, false)
  const most = (test: (text: string) => boolean) => texts.length > 0 && texts.filter(test).length > texts.length / 2
  return {
    index, middle: middleOf(numbers), share: texts.length === 0 ? 0 : (numbers.length + withUnit) / texts.length,
    isSalt: most(text => saltOf(text).kind !== 'unknown'),
    isDate: most(text => readDate(text, 'day-month-year') !== null),
    isText: most(text => /\p{L}{2}/u.test(text)),
  }
}

/** What columns hold when no heading says so: the first numbers are concentrations, the next temperatures, small ones behind them uncertainties. */
function guessAll(looks: readonly Look[]): Map<number, ColumnMeaning> {
  const guesses = new Map<number, ColumnMeaning>()
  const numeric = looks.filter(look => look.share > 0.6 && !look.isDate)
  const points = numeric.filter(({ middle }, place) => place > 0 && middle !== null && middle > 2)
  const [point = numeric[1]] = points
  const concentration = numeric.find(look => look !== point)
  const uncertainty = numeric.find(({ index, middle }) => point && index > point.index && middle !== null && middle < 2 && index !== concentration?.index)
  if (concentration) guesses.set(concentration.index, 'concentration')
  if (point) guesses.set(point.index, 'cloud-point')
  if (uncertainty) guesses.set(uncertainty.index, 'uncertainty')
  const salt = looks.find(({ isSalt }) => isSalt)
  const date = looks.find(({ isDate }) => isDate)
  const note = looks.findLast(({ isText, index }) => isText && index !== salt?.index && index !== date?.index)
  if (salt) guesses.set(salt.index, 'salt')
  if (date) guesses.set(date.index, 'date')
  if (note) guesses.set(note.index, 'note')
  return guesses
}

/** Gives columns a meaning by their values: all where there is no header, and those without a heading beside ones with. */
export function guessMeanings(columns: readonly HeadedColumn[], rows: readonly GridRow[], hasHeader: boolean): HeadedColumn[] {
  const some = rows.slice(0, sample)
  if (!hasHeader) {
    const guesses = guessAll(columns.map(({ index }) => lookAt(some, index)))
    return columns.map(column => ({ ...column, meaning: guesses.get(column.index) ?? 'kept' }))
  }
  return columns.map(column => column.header === '' && column.meaning === 'kept' && lookAt(some, column.index).isText ? { ...column, meaning: 'note' } : column)
}
