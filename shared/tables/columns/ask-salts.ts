import { sodiumSalts } from '#shared/science/chemistry/salts'
import { saltAmong, saltFormula } from '../cells/salt-cache'
import type { Question, TableChoices } from '../types'
import type { Settled } from './ask-units'
import type { HeadedColumn } from './columns'
import type { Head } from './head'
import type { Plan } from './plan'
import { ask, optionsOf } from './questions'

const known = sodiumSalts.map(({ formula }) => formula)

/** The salt is named near the top, or not at all. */
const mostRemarks = 100

const isSalt = (text: string) => saltFormula(text) !== null

/** Salts to choose from, the likeliest first; any other may be typed. */
const saltOptions = (first: string | null) => optionsOf(first === null ? known : [first, ...known.filter(salt => salt !== first)])

/** The one salt of a table without a column of salts: as a heading says, else as a person says, else as lines above it, the sheet's or the file's name do. */
export function settleSalt(columns: readonly HeadedColumn[], head: Head, names: readonly string[], choices: TableChoices): Pick<Plan, 'salt'> & { questions: Question[] } {
  const isNamed = columns.some(({ meaning }) => meaning === 'salt') || !columns.some(({ meaning, salt }) => meaning === 'cloud-point' && salt === null)
  if (isNamed) return { salt: null, questions: [] }
  if (hasSections(head)) return { salt: null, questions: [] }
  const inHeading = columns.find(({ meaning, salt }) => meaning === 'concentration' && salt !== null)?.salt
  if (inHeading) return { salt: inHeading, questions: [] }
  const remarks = head.preamble.slice(0, mostRemarks).flatMap(({ cells }) => cells.map(({ text }) => text))
  const assumed = remarks.map(saltAmong).find(salt => salt !== null) ?? names.map(saltInName).find(salt => salt !== null) ?? null
  const question = ask({
    code: 'salt-of-table', subject: '', message: 'No column names the salt. Which salt was measured?',
    options: saltOptions(assumed),
  }, assumed, choices, isSalt)
  return { salt: question.answer === null ? null : saltFormula(question.answer), questions: [question] }
}

const saltInName = (name: string) => saltAmong(name.replace(/\.[a-z]{1,5}$/i, '').replaceAll('-', ' '))

/** A row that names a salt for the rows below it makes the question for the table's salt needless. */
function hasSections({ below }: Head): boolean {
  return below.some(({ cells }) => {
    const texts = cells.filter(({ text }) => text.trim() !== '')
    return texts.length === 1 && !/^\s*[\d.,+-]/.test(texts[0]?.text ?? '') && saltAmong(texts[0]?.text ?? '') !== null
  })
}

/** Columns headed by an anion alone, or by a salt with a slip, are asked about: sodium is not the only cation. */
export function settleNearSalts({ columns, questions }: Settled, choices: TableChoices): Settled {
  const isChosen = ({ index }: HeadedColumn) => choices.columns?.some(choice => choice.index === index && choice.salt) ?? false
  const asked = columns.filter(column => column.meaning === 'cloud-point' && column.nearSalt !== null && !isChosen(column))
  const answers = asked.map(column => ({
    column,
    question: ask({ code: 'salt-of-table', subject: String(column.index), message: `Which salt does the column “${column.header}” hold?`, options: saltOptions(column.nearSalt) }, null, choices, isSalt),
  }))
  const settled = columns.map((column) => {
    const answer = answers.find(other => other.column === column)?.question.answer ?? null
    return answer === null ? column : { ...column, salt: saltFormula(answer) ?? column.salt }
  })
  return { columns: settled, questions: [...questions, ...answers.map(({ question }) => question)] }
}
