import { fold } from '../cells/fold'
import { ask } from '../columns/questions'
import type { FoundReading, Question, TableChoices } from '../types'

export interface KnownBatch { label: string, measuredOn: string | null }

const options = [{ value: 'join', label: 'the same batch: join it' }, { value: 'apart', label: 'another batch: keep it apart' }]

/** Asks about every batch of the table whose label the campaign already has; on the same day it is taken for the same. */
export function batchQuestions(readings: readonly FoundReading[], batches: readonly KnownBatch[], choices: TableChoices): Question[] {
  const days = new Map<string, Set<string | null>>()
  for (const { batch, date } of readings) {
    if (batch === null) continue
    const known = days.get(batch)
    if (known) known.add(date)
    else days.set(batch, new Set([date]))
  }
  return [...days].flatMap(([label, dates]) => {
    const existing = batches.find(batch => fold(batch.label) === fold(label))
    if (!existing) return []
    const isSameDay = existing.measuredOn !== null && dates.size === 1 && dates.has(existing.measuredOn)
    const when = existing.measuredOn === null ? '' : `, measured on ${existing.measuredOn}`
    return [ask({ code: 'batch-exists', subject: label, message: `The campaign already has a batch “${existing.label}”${when}. Is this the same one?`, options }, isSameDay ? 'join' : null, choices)]
  })
}
