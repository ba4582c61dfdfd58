import { v7 } from 'uuid'
import type { FoundReading } from '#shared/tables/types'
import type { Transaction } from '~~/server/database/client'
import { reading } from '~~/server/database/schema'
import type { Pinned } from '../revisions/changes'

type Row = Pinned['reading']

/** Where the found readings go. */
export interface Destination {
  project: string
  upload: string
  who: string
  now: Date
  clouds: 'on-heating' | 'on-cooling'
}

/** A found reading as the table of readings holds it; a blank has no series and no salt. */
export function readingRow(found: FoundReading, { project, upload, now, clouds }: Destination, series: string | null, batch: string): Row {
  const { salt, x, scale, y, sd, sdGiven, sdMeaning, n, direction, rate, ph, limit, note, row } = found
  return {
    id: v7(), project, series, batch, concentration: x, composition: salt === null ? [] : [{ salt, value: x, unit: scale, varied: true }],
    value: y, sd, sdGiven, sdGivenMeaning: sdGiven === null ? null : sdMeaning, n, direction: direction ?? (clouds === 'on-heating' ? 'heating' : 'cooling'),
    rate, ph, polymerConcentration: null, limit, note, origin: { kind: 'file', upload, row }, replaces: null, changeReason: null, changeWords: null, createdAt: now,
  }
}

/** The same as a revision pins it: a reason in the table keeps it set aside from the start. */
export function pinnedReading(row: Row, { setAside }: FoundReading, { who, now }: Destination): Pinned {
  return { reading: row, setAside: setAside === null ? null : { setAsideReason: setAside, setAsideBy: who, setAsideAt: now } }
}

/** One statement takes at most 65,535 values. */
const rowsAtOnce = 1_000

export async function insertInPieces<Given>(rows: readonly Given[], insert: (piece: Given[]) => Promise<unknown>): Promise<void> {
  for (let from = 0; from < rows.length; from += rowsAtOnce) await insert(rows.slice(from, from + rowsAtOnce))
}

export const insertReadings = (tx: Transaction, rows: readonly Row[]) => insertInPieces(rows, piece => tx.insert(reading).values(piece))
