import { readDate } from '../cells/dates'
import { saltOf } from '../cells/salt-cache'
import type { ColumnMeaning, GridRow } from '../types'
import type { HeadedColumn } from './columns'
import { meaningOf } from './header-words'
import { middleOf, valuesOf } from './values'

const sample = 200

interface Look { index: number, share: number, middle: number | null, isSalt: boolean, isDate: boolean, isText: boolean }

function lookAt(rows: readonly GridRow[], index: number): Look {
  const texts = rows.map(row => row.cells[index]?.text.trim() ?? '').filter(text => text !== '')
  const { numbers, withUnit } = valuesOf(rows, index, false)
  const most = (test: (text: string) => boolean) => texts.length > 0 && texts.filter(test).length > texts.length / 2
  return {
    index, middle: middleOf(numbers), share: texts.length === 0 ? 0 : (numbers.length + withUnit) / texts.length,
    isSalt: most(text => saltOf(text).kind !== 'unknown' && /\p{L}/u.test(text)),
    isDate: most(text => readDate(text, 'day-month-year') !== null),
    isText: most(text => /\p{L}{2}/u.test(text)),
  }
}

/** Concentrations are mostly smaller than this, cloud points larger; uncertainties are smaller, too. */
const smallest = 2

/** What columns may hold by their values: the first numbers are concentrations, larger ones temperatures, small ones behind them uncertainties. */
function guessAll(looks: readonly Look[]): Map<ColumnMeaning, number> {
  const guesses = new Map<ColumnMeaning, number>()
  const guess = (meaning: ColumnMeaning, look: Look | undefined) => {
    if (look) guesses.set(meaning, look.index)
    return look
  }
  const numeric = looks.filter(look => look.share > 0.6 && !look.isDate)
  const large = numeric.filter(({ middle }) => middle !== null && middle > smallest)
  const point = guess('cloud-point', large.find(look => look !== numeric[0]) ?? large[0] ?? numeric[1])
  const concentration = guess('concentration', numeric.find(look => look !== point))
  guess('uncertainty', numeric.find(look => point && look.index > point.index && look.middle !== null && look.middle < smallest && look !== concentration))
  const salt = guess('salt', looks.find(({ isSalt }) => isSalt))
  const date = guess('date', looks.find(({ isDate }) => isDate))
  guess('note', looks.findLast(look => look.isText && look !== salt && look !== date))
  return guesses
}

/** What a reading cannot do without; where no heading names it, an unknown heading may. */
function guessMissing(columns: readonly HeadedColumn[], rows: readonly GridRow[]): Map<ColumnMeaning, number> {
  const has = (meaning: ColumnMeaning) => columns.some(column => column.meaning === meaning)
  const open = columns.filter(({ meaning, name }) => meaning === 'kept' && meaningOf(name) === null).map(({ index }) => lookAt(rows, index))
  const numeric = open.filter(look => look.share > 0.6 && !look.isDate)
  const point = has('cloud-point') ? undefined : numeric.find(({ middle }, place) => middle !== null && middle > smallest && (has('concentration') || place > 0))
  const concentration = has('concentration') ? undefined : numeric.find(look => look !== point)
  const salt = has('salt') ? undefined : open.find(({ isSalt }) => isSalt)
  const found = [['cloud-point', point], ['concentration', concentration], ['salt', salt]] as const
  return new Map(found.flatMap(([meaning, look]) => look ? [[meaning, look.index] as const] : []))
}

/**
 * Gives columns a meaning by their values: all of them where there is no header, else what no heading names.
 * Words without a heading are notes.
 */
export function guessMeanings(columns: readonly HeadedColumn[], rows: readonly GridRow[], hasHeader: boolean): HeadedColumn[] {
  const some = rows.slice(0, sample)
  const guesses = hasHeader ? guessMissing(columns, some) : guessAll(columns.map(({ index }) => lookAt(some, index)))
  const meanings = new Map([...guesses].map(([meaning, index]) => [index, meaning]))
  // "Salt added (g)" holds amounts.
  const isAmount = ({ meaning, index }: HeadedColumn) => meaning === 'salt' && lookAt(some, index).share > 0.6
  const isNote = ({ header, meaning, index }: HeadedColumn) => hasHeader && header === '' && meaning === 'kept' && lookAt(some, index).isText
  return columns.map(column => ({ ...column, meaning: meanings.get(column.index) ?? (isNote(column) ? 'note' : isAmount(column) ? 'kept' : column.meaning) }))
}
