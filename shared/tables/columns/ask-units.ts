import type { HeadedColumn } from './columns'
import { ask, isOneOf, optionsOf } from './questions'
import { concentrationUnits, temperatureUnits, uncertaintyMeanings, type Question, type TableChoices } from '../types'
import { shareBetween, type ColumnValues } from './values'

export type Valued = HeadedColumn & { values: ColumnValues }

/** Where a column stands, for a question about it. */
const placeOf = ({ header, index }: HeadedColumn) => header === '' ? `in column ${index + 1}` : `under “${header}”`

/** Columns with what the answers say about them, and the questions that were asked. */
export interface Settled { columns: (Valued & { isUnitOpen: boolean })[], questions: Question[] }

/** Molar concentrations of salts stay below this; larger numbers are in another unit, or are to be asked for. */
const mostMolar = 6

function concentrationQuestion(column: Valued, choices: TableChoices): Question | null {
  const amounts = column.values.numbers.filter(({ value }) => value > 0)
  if (column.unit !== null || amounts.length === 0) return null
  const isMolar = !column.isForeign && amounts.every(({ value }) => value <= mostMolar) && amounts.some(({ decimals }) => decimals > 0)
  const message = column.isForeign
    ? `The head of the column “${column.header}” states a unit that cannot be converted here. Convert the column in your spreadsheet, or say which unit its numbers are in.`
    : `Which unit are the concentrations ${placeOf(column)} in?`
  return ask({ code: 'concentration-unit', subject: String(column.index), options: optionsOf(concentrationUnits), message }, isMolar ? 'mol/L' : null, choices)
}

const freezing = 273.15

function temperatureQuestion(columns: readonly Valued[], choices: TableChoices): Question | null {
  const numbers = columns.flatMap(({ values }) => values.numbers)
  const areKelvin = numbers.length > 0 && shareBetween(numbers, freezing, freezing + 100) > 0.6
  const isStated = columns.some(({ unit }) => unit !== null)
  const asked = { code: 'temperature-unit' as const, subject: '', options: optionsOf(temperatureUnits) }
  if (isStated) {
    const isOdd = areKelvin && numbers.length > 1 && columns.every(({ unit, index }) => unit === '°C' && !hasChosenUnit(choices, index))
    return isOdd ? ask({ ...asked, message: 'The header says °C, but the numbers look like kelvin. Which unit are they in?' }, null, choices) : null
  }
  const message = 'Which unit are the cloud points in?'
  if (areKelvin) return ask({ ...asked, message }, 'K', choices)
  const areHigh = numbers.length > 1 && shareBetween(numbers, 100, 250) > 0.6
  return areHigh ? ask({ ...asked, message }, null, choices) : null
}

function hasChosenUnit({ columns }: TableChoices, index: number): boolean {
  return columns?.some(choice => choice.index === index && choice.unit !== undefined && choice.unit !== null) ?? false
}

/** An uncertainty without a unit is in that of its temperatures; a difference in °C is one in K. */
function spreadUnit({ unit }: Valued, temperature: string | null): string {
  const own = unit ?? temperature
  return own === '°F' ? '°F' : 'K'
}

/** Units that neither head nor person states: assumed where the numbers leave no doubt, asked for otherwise. */
export function settleUnits(columns: readonly Valued[], choices: TableChoices): Settled {
  const points = columns.filter(({ meaning }) => meaning === 'cloud-point')
  const temperature = temperatureQuestion(points, choices)
  const isOpen = temperature !== null && temperature.answer === null
  const answer = temperature?.answer ?? null
  const pointUnit = (column: Valued) => isOneOf(temperatureUnits, answer) ? answer : column.unit ?? (isOpen ? null : '°C')
  const questions = temperature ? [temperature] : []
  const settled = columns.map((column) => {
    switch (column.meaning) {
      case 'cloud-point': return { ...column, unit: pointUnit(column), isUnitOpen: isOpen }
      case 'uncertainty': return { ...column, unit: spreadUnit(column, points[0] ? pointUnit(points[0]) : null), isUnitOpen: false }
      case 'concentration': return settledConcentration(column, questions, choices)
      default: return { ...column, isUnitOpen: false }
    }
  })
  return { columns: settled, questions }
}

/** @param questions to which the one about this column is added */
function settledConcentration(column: Valued, questions: Question[], choices: TableChoices): Settled['columns'][number] {
  const question = concentrationQuestion(column, choices)
  if (question) questions.push(question)
  const answer = question?.answer ?? null
  return { ...column, unit: isOneOf(concentrationUnits, answer) ? answer : column.unit, isUnitOpen: question !== null && answer === null }
}

const labels = {
  'sd-of-replicates': 'standard deviation of replicates (divided by √n once)',
  'standard-uncertainty': 'standard uncertainty (used as it stands)',
}

/** What each kind of uncertainty in the table holds; columns with the same kind of heading are asked about together. */
export function settleUncertainties({ columns, questions }: Settled, choices: TableChoices): Settled {
  const isAsked = (column: Valued) => column.meaning === 'uncertainty'
    ? column.values.numbers.length > 0 && !column.isUncertaintyCertain
    : column.meaning === 'cloud-point' && column.values.plusMinus > 0
  const isChosen = ({ index }: Valued) => choices.columns?.some(choice => choice.index === index && choice.uncertaintyMeaning) ?? false
  const kindOf = (column: Valued) => `${column.meaning}|${column.uncertaintyMeaning ?? ''}`
  const asked = columns.filter(column => isAsked(column) && !isChosen(column))
  const byKind = new Map([...new Set(asked.map(kindOf))].flatMap((kind) => {
    const first = asked.find(column => kindOf(column) === kind)
    if (!first) return []
    const where = first.meaning === 'cloud-point' ? `beside the cloud points ${placeOf(first)}` : placeOf(first)
    const question = { code: 'uncertainty-meaning' as const, subject: String(first.index), options: optionsOf(uncertaintyMeanings, labels), message: `What is the uncertainty ${where}?` }
    return [[kind, ask(question, first.uncertaintyMeaning, choices)] as const]
  }))
  const settled = columns.map((column) => {
    const answer = asked.includes(column) ? byKind.get(kindOf(column))?.answer ?? null : null
    return isOneOf(uncertaintyMeanings, answer) ? { ...column, uncertaintyMeaning: answer } : column
  })
  return { columns: settled, questions: [...questions, ...byKind.values()] }
}
