/** A series as it would be if the draft were kept now. */
import type { FitChoice, Series } from '#shared/contracts/series'
import { branchOf, entersFit, fitAsChosen, pointsOf } from '#shared/science/fitting'
import type { SeriesReading } from '~~/components/series/page/fitInput'
import { requestOf, typedValues, type Faults, type Request } from './changes'
import { choiceText, engineFaults, readChoice } from './choice'
import { isBlankDraft, type Draft } from './draft'

/** Stands for the id of a fit that is not kept. */
export const draftFit = 'draft'

export interface EditedSeries {
  /** with the draft's values, and the constants they give */
  series: Series
  request: Request
  faults: Faults
  /** something is typed or done, worth keeping or not */
  isChanged: boolean
  /** there is something to keep */
  hasChanges: boolean
}

/** @returns the series with every readable change in place, fitted again; what cannot be read stands as it was, with its fault */
export function editedSeries(series: Series, draft: Draft): EditedSeries {
  const asked = draft.choice && readChoice(draft.choice)
  const isOtherChoice = asked !== null && !sameChoice(asked.choice, series.choice)
  const request = requestOf(series, draft, isOtherChoice ? asked.choice : undefined)
  const readings = [...series.readings.map(reading => withDraft(reading, series, draft)), ...addedReadings(series, draft)]
  const choice = asked?.choice ?? series.choice
  const points = pointsOf(readings)
  const isChanged = !isBlankDraft(draft)
  const made = isChanged ? fitAsChosen(points, choice) : null
  const fit = isChanged ? made && { ...made.result, id: draftFit } : series.fit
  const faults: Faults = new Map([...request.faults, ...(asked?.faults ?? []), ...(isOtherChoice ? engineFaults(points, asked.choice) : [])])
  const { changes, batches } = request.body
  return { series: { ...series, readings, fit, choice }, request, faults, isChanged, hasChanges: changes.length + batches.length > 0 || isOtherChoice }
}

/** Both by way of the fields: what stands there by default and what is left out are the same. */
export function sameChoice(one: FitChoice | null, other: FitChoice | null): boolean {
  const [a, b] = [one, other].map(choice => JSON.stringify(readChoice(choiceText(choice)).choice))
  return a === b
}

function withDraft(reading: SeriesReading, { campaign }: Series, draft: Draft): SeriesReading {
  const { values } = typedValues(reading.id, reading, draft.cells[reading.id])
  const aside = draft.asides[reading.id]
  const setAside = aside === undefined ? (draft.backs.includes(reading.id) ? null : reading.setAside) : { reason: aside, by: 'you', at: new Date().toISOString() }
  return { ...reading, ...values, changed: formerOf(reading, values, draft), setAside, entersFit: entersFit({ ...reading, setAside }, campaign.clouds) }
}

/** What stood there before this draft; without a change in it, what stood there before the last correction. */
function formerOf({ id, x, y, sd, n, changed }: SeriesReading, values: Pick<SeriesReading, 'x' | 'y' | 'sd' | 'n'>, { reasons }: Draft): SeriesReading['changed'] {
  if (values.x === x && values.y === y && values.sd === sd && values.n === n) return changed
  return { x, y, sd, n, reason: reasons[id]?.reason ?? 'other', words: reasons[id]?.words ?? null }
}

/** Added rows that can be read so far. */
function addedReadings(series: Series, draft: Draft): SeriesReading[] {
  return draft.added.flatMap(({ key, batch }, index) => {
    const { values, faults } = typedValues(key, { x: 0, y: 0, sd: null, n: null, note: null }, { x: '', y: '', ...draft.cells[key] })
    const label = series.batches.find(({ id }) => id === batch)?.label
    if (faults.size > 0) return []
    return [{
      ...values, id: key, number: series.readings.length + index + 1, batch: batch && label !== undefined ? { id: batch, label } : null,
      direction: branchOf(series.campaign.clouds), limit: 'exact', blank: values.x === 0, setAside: null,
      entersFit: true, changed: null, origin: 'typed',
    } satisfies SeriesReading]
  })
}
