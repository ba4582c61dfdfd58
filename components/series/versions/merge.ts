/** Two people changed one series: what each did, what joins by itself, and the revision that each way out makes. */
import type { Change, NewRevision } from '#shared/contracts/revisions'
import type { FitChoice, Series } from '#shared/contracts/series'
import type { SeriesReading } from '~~/components/series/page/fitInput'
import { sameChoice } from '~~/components/series/edit/edited'
import { isAdded, type Draft } from '~~/components/series/edit/draft'
import { blanksRevision, placesOf, sameReading } from './states'

export type Side = 'mine' | 'theirs'

export interface Versions {
  /** what both started from */
  base: Series
  /** with the draft in it */
  mine: Series
  theirs: Series
  draft: Draft
}

export interface PlaceState {
  place: string
  base: SeriesReading | undefined
  mine: SeriesReading | undefined
  theirs: SeriesReading | undefined
  /** which side holds what the joined version takes; null: both changed it, somebody must say */
  takes: Side | null
}

/** Every place where the sides differ. A reading that only one side changed is taken from there. */
export function differingPlaces({ base, mine, theirs }: Versions): PlaceState[] {
  const [before, own, other] = [base.readings, mine.readings.filter(({ id }) => !isAdded(id)), theirs.readings].map(placesOf) as [ReturnType<typeof placesOf>, ReturnType<typeof placesOf>, ReturnType<typeof placesOf>]
  return [...new Set([...own.keys(), ...other.keys()])].flatMap((place) => {
    const state = { place, base: before.get(place), mine: own.get(place), theirs: other.get(place) }
    return sameReading(state.mine, state.theirs) ? [] : [{ ...state, takes: sideOf(state) }]
  })
}

function sideOf({ base, mine, theirs }: Omit<PlaceState, 'takes'>): Side | null {
  if (sameReading(base, mine)) return 'theirs'
  return sameReading(base, theirs) ? 'mine' : null
}

/** Whose choice of the fit the joined version takes; undefined: both are the same. */
export function choiceSide({ base, mine, theirs }: Versions): Side | null | undefined {
  if (sameChoice(mine.choice, theirs.choice)) return undefined
  if (sameChoice(base.choice, mine.choice)) return 'theirs'
  return sameChoice(base.choice, theirs.choice) ? 'mine' : null
}

const usually: FitChoice = { model: null, options: {} }

interface Decided {
  sides: ReadonlyMap<string, Side>
  choice: Side
}

/** The revision on top of theirs that takes each differing place from the side that was decided, and every row that was added here. */
export function joined(versions: Versions, { sides, choice }: Decided): NewRevision {
  const { mine, theirs, draft } = versions
  const taken = differingPlaces(versions).filter(({ place }) => sides.get(place) === 'mine').flatMap(state => changesToMine(state, versions))
  const added = mine.readings.filter(({ id }) => isAdded(id)).map(reading => ({ reading, change: additionOf(reading, draft) }))
  const all = [...taken, ...added]
  const blanks = all.filter(({ reading }) => reading.blank)
  const batches = [...new Set(blanks.map(({ reading }) => reading.batch!.id))].map(batch => ({
    batch, from: blanksRevision(theirs, batch), changes: blanks.filter(({ reading }) => reading.batch!.id === batch).map(({ change }) => change),
  }))
  const isOtherChoice = choice === 'mine' && !sameChoice(mine.choice, theirs.choice)
  return {
    from: theirs.revision, changes: all.filter(({ reading }) => !reading.blank).map(({ change }) => change), batches,
    ...(isOtherChoice && { choice: mine.choice ?? usually }),
  }
}

/** Mine over theirs: every place as it is here, also those that only they changed. */
export function mineOver(versions: Versions): NewRevision {
  return joined(versions, { sides: new Map(differingPlaces(versions).map(({ place }) => [place, 'mine'])), choice: 'mine' })
}

function changesToMine({ mine, theirs }: PlaceState, { theirs: { revision }, draft, base }: Versions): { reading: SeriesReading, change: Change }[] {
  if (!theirs) return []
  const aside = (reason: string) => ({ reading: theirs, change: { kind: 'set-aside' as const, reading: theirs.id, reason } })
  if (!mine) return [aside(`not in the version that was kept over revision ${revision}`)]
  const to = Object.fromEntries((['x', 'y', 'sd', 'n', 'note'] as const).filter(field => mine[field] !== theirs[field]).map(field => [field, mine[field]]))
  const { reason, words } = draft.reasons[mine.id] ?? { reason: 'other' as const, words: `as in revision ${base.revision ?? 0}, kept over revision ${revision}` }
  return [
    ...(Object.keys(to).length > 0 ? [{ reading: theirs, change: { kind: 'correct' as const, reading: theirs.id, to, reason: reason ?? 'other', ...(words.trim() && { words: words.trim() }) } }] : []),
    ...(mine.setAside && mine.setAside.reason !== theirs.setAside?.reason ? [aside(mine.setAside.reason)] : []),
    ...(!mine.setAside && theirs.setAside ? [{ reading: theirs, change: { kind: 'put-back' as const, reading: theirs.id } }] : []),
  ]
}

function additionOf({ id, x, y, sd, n, note }: SeriesReading, draft: Draft): Change {
  return { kind: 'add', x, y, sd, n, note, batch: draft.added.find(({ key }) => key === id)?.batch ?? null, limit: 'exact' }
}
