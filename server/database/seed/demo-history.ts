import { v7 } from 'uuid'
import design from '~~/data-seeds/demo/design.json'
import type { DemoReading } from '~~/data-seeds/demo/generate'

/** A measured row under the id it gets in the database. */
export interface KnownReading {
  id: string
  row: DemoReading
  /** the reading it took the place of, and why */
  replaces?: { id: string, words: string }
}

export interface PlannedRevision {
  summary: string
  by: string
  at: Date
  /** the one value before and after */
  values?: { before: number, after: number }
  readings: { reading: KnownReading, isSetAside: boolean }[]
}

const afternoon = (day: string, hour: number) => new Date(`${day}T${String(hour).padStart(2, '0')}:10:00Z`)
const molar = (concentration: number) => `${concentration.toFixed(2)} M`
const plain = (readings: readonly KnownReading[]) => readings.map(reading => ({ reading, isSetAside: false }))

function typedIn(readings: readonly KnownReading[], by: string): PlannedRevision[] {
  const { row } = readings[0]!
  return [{ summary: `${readings.length} readings typed in from the lab book`, by, at: afternoon(row.day, 16), readings: plain(readings) }]
}

/** The series that was typed in two sittings with a slip, which a later revision mends. */
function typedWithSlip(readings: readonly KnownReading[], by: string): PlannedRevision[] {
  const { concentration, typed, note } = design.typingSlip
  const { day } = readings[0]!.row
  const slipped = readings.map(reading =>
    reading.row.concentration === concentration ? { id: v7(), row: { ...reading.row, value: typed } } : reading)
  const mended = readings.map(reading =>
    reading.row.concentration === concentration ? { ...reading, replaces: { id: slipped.find(({ row }) => row.concentration === concentration)!.id, words: note } } : reading)
  const after = readings.find(({ row }) => row.concentration === concentration)!.row.value
  const half = 10
  return [
    { summary: `${half} readings typed in from the lab book`, by, at: afternoon(day, 14), readings: plain(slipped.slice(0, half)) },
    { summary: `${readings.length - half} readings added`, by, at: afternoon(day, 17), readings: plain(slipped) },
    { summary: `reading at ${molar(concentration)} corrected from ${typed.toFixed(2)}: ${note}`, by, at: afternoon(day, 18), readings: plain(mended), values: { before: typed, after } },
  ]
}

/** What happened to a series, revision by revision: typed in, mended, a reading set aside. */
export function historyOf(readings: readonly KnownReading[], recordedBy: string): PlannedRevision[] {
  const first = readings[0]
  if (!first) return []
  const { lab, campaign, anion } = first.row
  const slip = design.typingSlip
  const hasSlip = lab === slip.lab && campaign === slip.campaign && anion === slip.anion
  const typed = hasSlip ? typedWithSlip(readings, recordedBy) : typedIn(readings, recordedBy)
  const aside = readings.find(({ row }) => row.setAsideReason)
  if (!aside) return typed
  return [...typed, {
    summary: `reading at ${molar(aside.row.concentration)} set aside, with its reason`,
    by: aside.row.setAsideBy,
    at: afternoon(aside.row.setAsideOn, 9),
    readings: typed.at(-1)!.readings.map(({ reading }) => ({ reading, isSetAside: reading.row.setAsideReason !== '' })),
  }]
}
