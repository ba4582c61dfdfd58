/** Versions of one series beside each other: which readings differ, and in what. */
import type { Series } from '#shared/contracts/series'
import { fixed } from '#shared/science/notation'
import type { SeriesReading } from '~~/components/series/page/fitInput'

/** A reading's place is its own for good: a correction takes the place of what it corrects, additions come last. */
export type Places = Map<string, SeriesReading>

export function placesOf(readings: readonly SeriesReading[]): Places {
  const counts = new Map<string, number>()
  return new Map(readings.map((reading) => {
    const group = reading.blank ? `blank ${reading.batch?.id ?? ''}` : 'own'
    const place = counts.get(group) ?? 0
    counts.set(group, place + 1)
    return [`${group} ${place}`, reading]
  }))
}

const aspects = ['y', 'x', 'sd', 'n', 'note', 'aside'] as const
type Aspect = typeof aspects[number]

const valueOf = (reading: SeriesReading, aspect: Aspect) => aspect === 'aside' ? reading.setAside?.reason ?? null : reading[aspect]
const fewestDecimals = 2
const printed = (value: number) => fixed(value, Math.max(fewestDecimals, String(value).split('.')[1]?.length ?? 0))

const inWords: Record<Aspect, (reading: SeriesReading) => string> = {
  y: ({ y }) => printed(y),
  x: ({ x }) => `at ${printed(x)} M`,
  sd: ({ sd }) => sd === null ? 'no uncertainty' : `± ${sd} K`,
  n: ({ n }) => n === null ? 'samples not given' : `${n} samples`,
  note: ({ note }) => note ? `“${note}”` : 'no note',
  aside: ({ setAside }) => setAside ? `set aside: ${setAside.reason}` : 'in use',
}

/** In what readings of one place differ; a reading that is missing differs in all. */
export function differingAspects(readings: readonly (SeriesReading | undefined)[]): Aspect[] {
  const there = readings.filter(reading => reading !== undefined)
  if (there.length < readings.length) return there.some(({ setAside }) => setAside) ? ['y', 'aside'] : ['y']
  return aspects.filter(aspect => new Set(there.map(reading => valueOf(reading, aspect))).size > 1)
}

export const sameReading = (one: SeriesReading | undefined, other: SeriesReading | undefined) =>
  one !== undefined && other !== undefined ? differingAspects([one, other]).length === 0 : one === other

/** A reading in the aspects that matter here; the sentence for none is the reader's. */
export function readingWords(reading: SeriesReading | undefined, which: readonly Aspect[]): string {
  return reading ? which.map(aspect => inWords[aspect](reading)).join(', ') : '—'
}

export function placeLabel(reading: SeriesReading): string {
  const branch = reading.direction === 'cooling' ? ', cooling' : ''
  return reading.blank ? `blank of ${reading.batch?.label ?? 'the batch'}${branch}` : `${printed(reading.x)} M${branch}`
}

/** Batches with the revision of their blanks, as changes to them must name it. */
export const blanksRevision = ({ batches }: Series, batch: string) => batches.find(({ id }) => id === batch)?.revision ?? null
