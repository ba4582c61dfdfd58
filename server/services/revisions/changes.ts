import { v7 } from 'uuid'
import type { Change } from '#shared/contracts/revisions'
import type { batchRevisionReading, reading, revisionReading } from '~~/server/database/schema'
import type { Fault } from '../errors'

type Reading = typeof reading.$inferSelect
type SetAside = Pick<typeof revisionReading.$inferSelect & typeof batchRevisionReading.$inferSelect, 'setAsideReason' | 'setAsideBy' | 'setAsideAt'>

/** A reading as one revision holds it. */
export interface Pinned {
  reading: Reading
  setAside: SetAside | null
}

/** What the changes are applied to, and in whose name. */
export interface Sheet {
  pinned: readonly Pinned[]
  who: string
  now: Date
  /** path of the changes in the request, for faults */
  path: string
  /** Makes the row of an added reading; a string is the fault. */
  add: (change: Extract<Change, { kind: 'add' }>) => Omit<Reading, 'createdAt'> | { fault: Fault }
  /** What a concentration must be here, or nothing to object to. */
  objectTo: (concentration: number) => string | null
}

export interface Changed {
  pinned: Pinned[]
  made: (Omit<Reading, 'createdAt'>)[]
  faults: Fault[]
  /** in the order of the changes, for the summary: the place in the table and the value before */
  told: Told[]
}

export interface Told { change: Change, number: number, before: Reading | null }

/** Applies changes one after the other. A correction makes a new reading in the old one's place; nothing is ever altered. */
export function applyChanges(changes: readonly Change[], sheet: Sheet): Changed {
  const state: Changed = { pinned: [...sheet.pinned], made: [], faults: [], told: [] }
  const places = new Map(sheet.pinned.map(({ reading }, place) => [reading.id, place]))
  changes.forEach((change, index) => {
    const path = `${sheet.path}.${index}`
    if (change.kind === 'add') return addOne(change, path, sheet, state)
    const place = places.get(change.reading)
    const found = place === undefined ? undefined : state.pinned[place]
    if (place === undefined || !found) return void state.faults.push({ path: `${path}.reading`, message: 'must be a reading of the revision that was changed' })
    state.told.push({ change, number: place + 1, before: found.reading })
    state.pinned[place] = changeOne(change, found, path, sheet, state)
  })
  return state
}

function addOne(change: Extract<Change, { kind: 'add' }>, path: string, sheet: Sheet, state: Changed): void {
  const objection = sheet.objectTo(change.x)
  if (objection) return void state.faults.push({ path: `${path}.x`, message: objection })
  const row = sheet.add(change)
  if ('fault' in row) return void state.faults.push({ ...row.fault, path: `${path}.${row.fault.path}` })
  state.made.push(row)
  state.pinned.push({ reading: { ...row, createdAt: sheet.now }, setAside: null })
  state.told.push({ change, number: state.pinned.length, before: null })
}

function changeOne(change: Exclude<Change, { kind: 'add' }>, found: Pinned, path: string, sheet: Sheet, state: Changed): Pinned {
  if (change.kind === 'set-aside') {
    return { ...found, setAside: { setAsideReason: change.reason, setAsideBy: sheet.who, setAsideAt: sheet.now } }
  }
  if (change.kind === 'put-back') {
    if (!found.setAside) state.faults.push({ path: `${path}.reading`, message: 'is not set aside' })
    return { ...found, setAside: null }
  }
  const faults = faultsOfCorrection(change, found.reading, path, sheet)
  state.faults.push(...faults)
  if (faults.length > 0) return found
  const corrected = correct(change, found.reading)
  state.made.push(corrected)
  return { ...found, reading: { ...corrected, createdAt: sheet.now } }
}

type Correction = Extract<Change, { kind: 'correct' }>

function faultsOfCorrection({ to, reason, words }: Correction, { concentration, value, sd, n, note }: Reading, path: string, { objectTo }: Sheet): Fault[] {
  const faults: Fault[] = []
  const next = { x: concentration, y: value, sd, n, note, ...to }
  const isSame = next.x === concentration && next.y === value && next.sd === sd && next.n === n && next.note === note
  if (isSame) faults.push({ path: `${path}.to`, message: 'must differ from what stands there' })
  if (reason === 'other' && !words) faults.push({ path: `${path}.words`, message: 'must say why, because the reason is "other"' })
  const objection = to.x === undefined ? null : objectTo(to.x)
  if (objection) faults.push({ path: `${path}.to.x`, message: objection })
  return faults
}

function correct({ to, reason, words }: Correction, before: Reading): Omit<Reading, 'createdAt'> {
  const { createdAt: _, ...row } = before
  const concentration = to.x ?? before.concentration
  const hasNewSpread = to.sd !== undefined && to.sd !== before.sd
  return {
    ...row,
    id: v7(),
    concentration,
    composition: before.composition.map(part => part.varied ? { ...part, value: concentration } : part),
    value: to.y ?? before.value,
    sd: to.sd === undefined ? before.sd : to.sd,
    ...(hasNewSpread && { sdGiven: to.sd ?? null, sdGivenMeaning: to.sd === null ? null : 'standard-uncertainty' as const }),
    n: to.n === undefined ? before.n : to.n,
    note: to.note === undefined ? before.note : to.note || null,
    origin: { kind: 'typed' },
    replaces: before.id,
    changeReason: reason,
    changeWords: words || null,
  }
}
