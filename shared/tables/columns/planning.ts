import { sodiumSalts } from '#shared/science/chemistry/salts'
import { settleUncertainties, settleUnits, type Valued } from './ask-units'
import { assignRoles } from './column-roles'
import { headedColumns, type HeadedColumn } from './columns'
import { orderOf } from '../cells/dates'
import { guessMeanings } from './guess'
import type { Head } from './head'
import { isOwnExport } from './own-export'
import type { Plan } from './plan'
import { ask, isOneOf, optionsOf } from './questions'
import { saltAmong, saltOf } from '../cells/salt-cache'
import { dateOrders, type Grid, type Question, type TableChoices } from '../types'
import { mayGroup, middleOf, usualDecimalsOf, valuesOf } from './values'

const numeric = new Set(['concentration', 'cloud-point', 'uncertainty', 'samples', 'rate', 'pH'])

function withChoices(columns: readonly HeadedColumn[], { columns: chosen = [] }: TableChoices): HeadedColumn[] {
  return columns.map((column) => {
    const said = chosen.findLast(({ index }) => index === column.index)
    if (!said) return column
    const isNew = said.meaning !== undefined && said.meaning !== column.meaning
    const salt = said.salt ? saltFormula(said.salt) : said.salt
    return { ...column, ...(isNew ? { unit: null, uncertaintyMeaning: null, isUncertaintyCertain: false } : {}), ...withoutUndefined({ ...said, salt }) }
  })
}

function withoutUndefined<T extends object>(values: T): Partial<T> {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined)) as Partial<T>
}

function saltFormula(text: string): string | null {
  const reading = saltOf(text)
  return reading.kind === 'salt' ? reading.salt.formula : null
}

/** The mark of most decimals; where every number may as well have its thousands set apart, it is asked for. */
function settleDecimal(columns: readonly Valued[], choices: TableChoices): Pick<Plan, 'decimal' | 'isMixed'> & { questions: Question[] } {
  const sum = (key: 'points' | 'commas' | 'doubtful') => columns.reduce((total, { values }) => total + values[key], 0)
  const [points, commas] = [sum('points'), sum('commas')]
  const isMixed = points > 0 && commas > 0
  if (choices.decimal) return { decimal: choices.decimal, isMixed: isMixed || (choices.decimal === '.' ? commas > 0 : points > 0), questions: [] }
  if (points + commas > 0 || sum('doubtful') === 0) return { decimal: commas > points ? ',' : '.', isMixed, questions: [] }
  const question = ask({
    code: 'decimal-mark', subject: '', message: 'Numbers such as 1,250 can be read in two ways. Which mark stands before the decimals?',
    options: optionsOf(['.', ','], { '.': 'a point', ',': 'a comma' }),
  }, null, choices)
  return { decimal: question.answer === ',' ? ',' : '.', isMixed: false, questions: [question] }
}

function settleDates(columns: readonly HeadedColumn[], { below }: Head, choices: TableChoices): Pick<Plan, 'dateOrder'> & { questions: Question[] } {
  const column = columns.find(({ meaning }) => meaning === 'date')
  if (!column) return { dateOrder: 'day-month-year', questions: [] }
  if (isOneOf(dateOrders, column.unit)) return { dateOrder: column.unit, questions: [] }
  const { order, isClear } = orderOf(below.flatMap(({ cells }) => cells[column.index]?.isDate ? [] : [cells[column.index]?.text ?? '']))
  if (isClear) return { dateOrder: order, questions: [] }
  const labels = { 'day-month-year': 'day, month, year', 'month-day-year': 'month, day, year', 'year-month-day': 'year, month, day' }
  const question = ask({ code: 'date-order', subject: '', message: `In which order are the dates under “${column.header}” written?`, options: optionsOf(dateOrders, labels) }, order, choices)
  return { dateOrder: isOneOf(dateOrders, question.answer) ? question.answer : order, questions: [question] }
}

/** The one salt of a table without a column of salts: as a heading says, else as a person says, else as lines above it or the file's name do. */
function settleSalt(columns: readonly HeadedColumn[], head: Head, fileName: string, choices: TableChoices): Pick<Plan, 'salt'> & { questions: Question[] } {
  const isNamed = columns.some(({ meaning }) => meaning === 'salt') || !columns.some(({ meaning, salt }) => meaning === 'cloud-point' && salt === null)
  if (isNamed) return { salt: null, questions: [] }
  const inHeading = columns.find(({ meaning, salt }) => meaning === 'concentration' && salt !== null)?.salt
  if (inHeading) return { salt: inHeading, questions: [] }
  const remarks = head.preamble.flatMap(({ cells }) => cells.map(({ text }) => text))
  const assumed = remarks.map(saltAmong).find(salt => salt !== null) ?? saltAmong(fileName.replace(/\.[a-z]{1,5}$/i, '').replaceAll('-', ' '))
  const known = sodiumSalts.map(({ formula }) => formula)
  const question = ask({
    code: 'salt-of-table', subject: '', message: 'No column names the salt. Which salt was measured?',
    options: optionsOf(assumed && !known.includes(assumed) ? [assumed, ...known] : known),
  }, assumed, choices)
  return { salt: question.answer === null ? null : saltFormula(question.answer), questions: [question] }
}

/** A row that names a salt for the rows below it makes the question for the table's salt needless. */
function hasSections({ below }: Head): boolean {
  return below.some(({ cells }) => {
    const texts = cells.filter(({ text }) => text.trim() !== '')
    return texts.length === 1 && !/^\s*[\d.,+-]/.test(texts[0]?.text ?? '') && saltAmong(texts[0]?.text ?? '') !== null
  })
}

/** Settles how a table is read: what its columns hold, its units, marks and dates, and what has to be asked. */
export function planTable(grid: Grid, head: Head, width: number, fileName: string, choices: TableChoices): { plan: Plan, questions: Question[] } {
  const headed = withChoices(assignRoles(guessMeanings(headedColumns(head, width), head.below, head.header !== null)), choices)
  const valued = headed.map(column => ({ ...column, values: valuesOf(numeric.has(column.meaning) ? head.below : [], column.index, mayGroup(column)) }))
  const marks = settleDecimal(valued, choices)
  const settled = settleUncertainties(settleUnits(valued, choices), choices)
  const dates = settleDates(settled.columns, head, choices)
  const salt = settleSalt(settled.columns, head, fileName, choices)
  const isSectioned = salt.questions.length > 0 && hasSections(head)
  const columns = settled.columns.map(({ values, ...column }) => ({
    ...column, middle: middleOf(values.numbers), usualDecimals: usualDecimalsOf(values.numbers), mayGroup: mayGroup(column),
  }))
  return {
    plan: { format: grid.format, columns, decimal: marks.decimal, isMixed: marks.isMixed, dateOrder: dates.dateOrder, salt: isSectioned ? null : salt.salt, isOwnExport: isOwnExport(headed) },
    questions: [...settled.questions, ...marks.questions, ...dates.questions, ...(isSectioned ? [] : salt.questions)],
  }
}
