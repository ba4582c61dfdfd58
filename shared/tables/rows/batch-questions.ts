import { fold } from '../cells/fold'
import { ask } from '../columns/questions'
import type { FoundReading, Question, TableChoices } from '../types'

export interface KnownBatch { label: string, measuredOn: string | null }

/** The days of each batch that the table names; null: a reading without a date. */
function daysOfBatches(readings: readonly FoundReading[]): Map<string, Set<string | null>> {
  const days = new Map<string, Set<string | null>>()
  for (const { batch, date } of readings) {
    if (batch === null) continue
    const known = days.get(batch)
    if (known) known.add(date)
    else days.set(batch, new Set([date]))
  }
  return days
}

const campaignOptions = [{ value: 'join', label: 'the same batch: join it' }, { value: 'apart', label: 'another batch: keep it apart' }]
const tableOptions = [{ value: 'join', label: 'one batch with one blank' }, { value: 'apart', label: 'a batch for each day' }]

function questionAbout(label: string, dates: ReadonlySet<string | null>, batches: readonly KnownBatch[], isOwnExport: boolean, choices: TableChoices): Question[] {
  const existing = batches.find(batch => fold(batch.label) === fold(label))
  if (existing) {
    const isSameDay = existing.measuredOn !== null && dates.size === 1 && dates.has(existing.measuredOn)
    const when = existing.measuredOn === null ? '' : `, measured on ${existing.measuredOn}`
    const message = `The campaign already has a batch “${existing.label}”${when}. Is this the same one?`
    return [ask({ code: 'batch-exists', subject: label, message, options: campaignOptions }, isSameDay ? 'join' : null, choices)]
  }
  const days = [...dates].filter(date => date !== null).sort()
  if (days.length < 2 || isOwnExport) return []
  const message = `Batch “${label}” was measured on ${days.length} days, ${days[0]} to ${days.at(-1)}. Is it one batch?`
  return [ask({ code: 'batch-exists', subject: label, message, options: tableOptions }, 'join', choices)]
}

/**
 * Asks about every batch of the table whose label the campaign already has (on the same day it is taken for the same),
 * and about one label that stands for several days, which in an export of our own are batches of several campaigns.
 */
export function batchQuestions(readings: readonly FoundReading[], batches: readonly KnownBatch[], isOwnExport: boolean, choices: TableChoices): Question[] {
  return [...daysOfBatches(readings)].flatMap(([label, dates]) => questionAbout(label, dates, batches, isOwnExport, choices))
}

/** Gives each day its own batch where a person says that one label stands for several. */
export function withBatchesApart(readings: readonly FoundReading[], questions: readonly Question[]): FoundReading[] {
  const apart = new Set(questions.filter(({ options, answer }) => options === tableOptions && answer === 'apart').map(({ subject }) => subject))
  if (apart.size === 0) return [...readings]
  return readings.map(reading => reading.batch !== null && reading.date !== null && apart.has(reading.batch) ? { ...reading, batch: `${reading.batch}, ${reading.date}` } : reading)
}
