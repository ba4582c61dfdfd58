/** From what is typed to what is sent: one change a reading, blanks to their batches. */
import { newRevisionContract, type Change, type NewRevision } from '#shared/contracts/revisions'
import type { Series } from '#shared/contracts/series'
import { readCell } from '~~/composables/sheet/cell'
import type { SeriesReading } from '~~/components/series/page/fitInput'
import { cellFields, type CellField, type Draft } from './draft'

/** Where a fault stands: `id.y`, `id.reason`, `id.words`, `id.aside`, `id.batch`. */
export type Faults = Map<string, string>
type Values = Pick<SeriesReading, CellField>

export interface Typed {
  values: Values
  faults: Faults
}

const needed = { x: 'type a concentration', y: 'type a cloud point' } as const

/** The values of a row: as typed where they can be read, else as they stand. */
export function typedValues(key: string, before: Values, cells: Draft['cells'][string] = {}): Typed {
  const values = { ...before }
  const faults: Faults = new Map()
  if (cells.note !== undefined) values.note = cells.note.trim() || null
  for (const field of ['x', 'y', 'sd', 'n'] as const) {
    const typed = cells[field]
    if (typed === undefined) continue
    const cell = readCell(typed)
    if (cell.kind === 'number') values[field] = cell.value
    else if (cell.kind === 'bad') faults.set(`${key}.${field}`, cell.suggestion ? `no number; ${cell.suggestion} was meant?` : 'no number')
    else if (field === 'sd' || field === 'n') values[field] = null
    else faults.set(`${key}.${field}`, needed[field])
  }
  return { values, faults }
}

/** A change with the row it comes from, so that a refusal finds its cell. */
interface Placed { key: string, change: Change, batch: string | null }

export interface Request {
  body: NewRevision
  /** key of the row behind each path of a change, such as `changes.3` */
  rows: Map<string, string>
  faults: Faults
}

const nothing: Values = { x: 0, y: 0, sd: null, n: null, note: null }
const isEmptyRow = (cells: Draft['cells'][string] = {}) => Object.values(cells).every(typed => !typed.trim())

/** What is to be kept of a draft. A row that was added and left empty counts for nothing. */
export function requestOf(series: Series, draft: Draft, choice: NewRevision['choice']): Request {
  const faults: Faults = new Map()
  const placed = [...series.readings.flatMap(reading => changesOf(reading, draft, faults)), ...draft.added.flatMap(row => addition(row, draft, faults))]
  const rows = new Map<string, string>()
  const own = placed.filter(({ batch }) => batch === null)
  own.forEach(({ key }, index) => rows.set(`changes.${index}`, key))
  const batches = [...new Set(placed.flatMap(({ batch }) => batch ?? []))].map((batch, place) => {
    const changes = placed.filter(one => one.batch === batch)
    changes.forEach(({ key }, index) => rows.set(`batches.${place}.changes.${index}`, key))
    return { batch, from: series.batches.find(({ id }) => id === batch)?.revision ?? null, changes: changes.map(({ change }) => change) }
  })
  const body: NewRevision = { from: series.revision, changes: own.map(({ change }) => change), batches, ...(choice && { choice }) }
  const broken = newRevisionContract.safeParse(body).error?.issues ?? []
  for (const [where, message] of placedFaults(broken.map(({ path, message }) => ({ path: path.join('.'), message })), rows)) if (!faults.has(where)) faults.set(where, message)
  return { body, rows, faults }
}

function changesOf(reading: SeriesReading, { cells, reasons, asides, backs }: Draft, faults: Faults): Placed[] {
  const { id } = reading
  const batch = reading.blank ? reading.batch!.id : null
  const placed: Placed[] = []
  const typed = typedValues(id, reading, cells[id])
  typed.faults.forEach((message, where) => faults.set(where, message))
  const to = Object.fromEntries(cellFields.filter(field => typed.values[field] !== reading[field]).map(field => [field, typed.values[field]]))
  if (Object.keys(to).length > 0) {
    const { reason, words } = reasons[id] ?? { reason: null, words: '' }
    if (!reason) faults.set(`${id}.reason`, 'say why the value changes')
    if (reason === 'other' && !words.trim()) faults.set(`${id}.words`, 'say why in a few words')
    placed.push({ key: id, batch, change: { kind: 'correct', reading: id, to, reason: reason ?? 'other', ...(words.trim() && { words: words.trim() }) } })
  }
  const aside = asides[id]
  if (aside !== undefined) {
    if (!aside.trim()) faults.set(`${id}.aside`, 'say why it is set aside')
    placed.push({ key: id, batch, change: { kind: 'set-aside', reading: id, reason: aside.trim() || '—' } })
  }
  if (backs.includes(id)) placed.push({ key: id, batch, change: { kind: 'put-back', reading: id } })
  return placed
}

function addition({ key, batch }: Draft['added'][number], { cells }: Draft, faults: Faults): Placed[] {
  if (isEmptyRow(cells[key])) return []
  const typed = typedValues(key, nothing, { x: '', y: '', ...cells[key] })
  typed.faults.forEach((message, where) => faults.set(where, message))
  const isBlank = typed.faults.size === 0 && typed.values.x === 0
  if (isBlank && !batch) faults.set(`${key}.batch`, 'a blank belongs to a batch: choose it')
  return [{ key, batch: isBlank ? batch : null, change: { kind: 'add', ...typed.values, batch, limit: 'exact' } }]
}

/** Faults by path of the request, moved to the cells they are about. Those about no cell keep their path. */
export function placedFaults(errors: readonly { path: string, message: string }[], rows: ReadonlyMap<string, string>): Faults {
  return new Map(errors.map(({ path, message }) => {
    const [, change, rest = ''] = /^((?:batches\.\d+\.)?changes\.\d+)(?:\.(.*))?$/.exec(path) ?? []
    const key = change && rows.get(change)
    return [key ? `${key}.${rest.replace(/^to\.?/, '') || 'y'}` : path, message]
  }))
}
