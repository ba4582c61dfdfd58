import { settleUncertainties, settleUnits, type Valued } from './ask-units'
import { assignRoles } from './column-roles'
import { withChoices } from './choices'
import { headedColumns, type HeadedColumn } from './columns'
import { orderOf } from '../cells/dates'
import { guessMeanings } from './guess'
import type { Head } from './head'
import { isOwnExport } from './own-export'
import type { Plan } from './plan'
import { settleNearSalts, settleSalt } from './ask-salts'
import { ask, isOneOf, optionsOf } from './questions'
import { dateOrders, type Grid, type Question, type TableChoices } from '../types'
import { mayGroup, middleOf, usualDecimalsOf, valuesOf } from './values'

const numeric = new Set(['concentration', 'cloud-point', 'uncertainty', 'samples', 'rate', 'pH'])

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

/** Headings about which the file leaves a doubt that nobody has settled yet. */
function doubtfulHeadings(named: readonly HeadedColumn[], guessed: readonly HeadedColumn[], headed: readonly HeadedColumn[], choices: TableChoices): Pick<Plan, 'leftBehind' | 'readByValues'> {
  const isSettled = ({ index }: HeadedColumn) => choices.columns?.some(choice => choice.index === index && choice.meaning !== undefined) ?? false
  const headings = (columns: readonly HeadedColumn[]) => columns.filter(column => column.header !== '' && !isSettled(column)).map(({ header }) => header)
  return {
    leftBehind: headings(guessed.filter(({ meaning }, index) => meaning !== 'kept' && headed[index]?.meaning === 'kept')),
    readByValues: headings(named.filter(({ meaning }, index) => meaning === 'kept' && guessed[index]?.meaning !== 'kept')),
  }
}

/** Settles how a table is read: what its columns hold, its units, marks and dates, and what has to be asked. */
export function planTable(grid: Grid, head: Head, width: number, fileName: string, choices: TableChoices): { plan: Plan, questions: Question[] } {
  const named = headedColumns(head, width)
  const guessed = guessMeanings(named, head.below, head.header !== null)
  const headed = withChoices(assignRoles(guessed), choices)
  const valued = headed.map(column => ({ ...column, values: valuesOf(numeric.has(column.meaning) ? head.below : [], column.index, mayGroup(column)) }))
  const marks = settleDecimal(valued, choices)
  const settled = settleUncertainties(settleUnits(valued, choices), choices)
  const dates = settleDates(settled.columns, head, choices)
  const near = settleNearSalts(settled, choices)
  const salt = settleSalt(near.columns, head, [grid.sheet ?? '', fileName], choices)
  const columns = near.columns.map(({ values, ...column }) => ({
    ...column, middle: middleOf(values.numbers), usualDecimals: usualDecimalsOf(values.numbers), mayGroup: mayGroup(column),
  }))
  return {
    plan: { format: grid.format, columns, decimal: marks.decimal, isMixed: marks.isMixed, dateOrder: dates.dateOrder, salt: salt.salt, isOwnExport: isOwnExport(headed), ...doubtfulHeadings(named, guessed, headed, choices) },
    questions: [...near.questions, ...marks.questions, ...dates.questions, ...salt.questions],
  }
}
