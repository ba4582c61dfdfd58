import type { Series } from '#shared/contracts/series'
import { influenceOn, type Influence } from '#shared/science/diagnostics/influence'
import { curveAt, fitOrNone, supportOf, type FitResult } from '#shared/science/fitting'
import { fixed, plain } from '#shared/science/notation'
import { bindingFinding, straightLineFinding } from '~~/components/ui/findings'
import type { MarginNoteText } from '~~/components/ui/marginNoteText'
import { noteSentences } from '~~/components/ui/noteSentences'
import { quantitySymbol, unitMarkup } from '~~/components/ui/quantityNames'
import { fitRequest, leadingConstant, usedReadings, type SeriesReading } from './fitInput'
import { formNames } from './modelRows'
import { keysOf } from './readingRows'
import { inScatters, scatterUnit } from './scatter'

/** A margin note with the letter of the place it speaks of. */
export interface KeyedNote {
  note: MarginNoteText
  letter?: string
}

function fitWith(series: Series, reading: SeriesReading): FitResult | null {
  const request = fitRequest(series, series.readings.filter(other => other === reading || other.entersFit))
  return request && fitOrNone(request)
}

/** What putting one reading back would do to the constant that matters and to the scatter. */
function consequence(series: Series, restored: FitResult | null): string {
  const leading = leadingConstant(series)
  const back = restored?.parameters.find(({ name }) => name === leading?.name)?.estimate
  const scatter = [series.fit?.residualStandardDeviation, restored?.residualStandardDeviation]
  if (!leading || scatter.some(value => typeof value !== 'number')) return ''
  const values = `the scatter from ${fixed(scatter[0]!, 2)} to ${fixed(scatter[1]!, 2)} ${scatterUnit(series.fit?.weighting).words}.`
  if (typeof back !== 'number') return ` Putting it back would leave ${quantitySymbol(leading.name)} open and move ${values}`
  return ` Putting it back would move ${quantitySymbol(leading.name)} from ${plain(leading.estimate, 3)} to ${plain(back, 3)} ${unitMarkup(leading.unit)} and ${values}`
}

function setAsideNotes(series: Series): KeyedNote[] {
  const keys = keysOf(series.readings)
  return series.readings.filter(reading => reading.setAside).map((reading) => {
    const curve = series.fit && curveAt(series.fit, [reading.x])
    const distance = curve ? reading.y - curve[0]! : null
    const times = distance !== null && series.fit ? inScatters(distance, reading.sd, series.fit) : null
    const place = distance === null
      ? `Reading ${reading.number} is kept and drawn, and takes no part in a fit.`
      : `Reading ${reading.number} sits ${fixed(Math.abs(distance), 2)} K ${distance < 0 ? 'below' : 'above'} the curve${times === null ? '' : `, ${fixed(times, times < 2 ? 1 : 0)} times the scatter`}.`
    return {
      letter: keys.get(reading.number),
      note: { heading: 'One reading is set aside', sentences: [place + (distance === null ? '' : consequence(series, fitWith(series, reading)))] },
    }
  })
}

/** Whether the readings ask for a binding term, for the two forms that the verdict is about. */
function bindingNotes(series: Series): KeyedNote[] {
  const request = fitRequest(series)
  if (request?.model !== 'linear' && request?.model !== 'linear-langmuir') return []
  const [line, binding] = (['linear', 'linear-langmuir'] as const).map(model => fitOrNone({ ...request, model }))
  if (!line || !binding) return []
  const note = request.model === 'linear' ? straightLineFinding(supportOf(request, line, binding)) : bindingFinding(binding, line)
  return note ? [{ note }] : []
}

function formNote({ support, fit: current }: Series): KeyedNote[] {
  const others = support.models.filter(({ model, deltaAicc }) => model !== current?.model && deltaAicc !== null)
  const next = others.sort((a, b) => a.deltaAicc! - b.deltaAicc!)[0]
  const own = support.models.find(({ model }) => model === current?.model)?.deltaAicc
  if (!next || own !== 0) return []
  return [{ note: {
    heading: 'The form is enough',
    sentences: [`Of the forms compared it has the lowest AICc; the next, ${formNames[next.model]}, stands ${fixed(next.deltaAicc!, 1)} above it.`],
    tag: 'holds',
  } }]
}

/** A reading that moves the constant by more than one standard error is worth naming; our choice. */
const steadyWithin = 1

function influenceNote(series: Series, influences: readonly Influence[]): KeyedNote[] {
  const leading = leadingConstant(series)
  const shifts = influences.map(({ shift }) => shift === null ? Infinity : Math.abs(shift))
  const largest = Math.max(...shifts)
  const isDoubted = series.fit?.notes.some(({ code }) => code === 'one-point-decides')
  if (!leading || influences.length === 0 || isDoubted || largest > steadyWithin) return []
  const symbol = quantitySymbol(leading.name)
  return [{ note: {
    heading: `${symbol} leans on no single reading`,
    sentences: [`Leaving out any one reading moves ${symbol} by at most ${fixed(largest, 1)} standard errors.`],
    tag: 'holds',
  } }]
}

function emptyNote(series: Series): KeyedNote[] {
  if (series.fit) return []
  const measured = series.readings.filter(reading => !reading.blank).length
  const sentence = measured === 0
    ? 'Nobody has measured this salt in this campaign yet.'
    : 'Fewer than four different concentrations, blanks included, cannot tell a line from a curve: no constants are given.'
  return [{ note: { heading: measured === 0 ? 'No readings' : 'Too few readings for a fit', sentences: [sentence], tag: 'no-constants' } }]
}

/** How far each reading pulls the constant that matters; nothing without a fit. */
export function influencesOf(series: Series): Influence[] {
  const request = fitRequest(series)
  const leading = leadingConstant(series)
  return request && leading ? influenceOn(leading.name, request, leading.estimate, leading.standardError) : []
}

/** What the readings of one series do and do not support, most pressing first. */
export function seriesNotes(series: Series, influences: readonly Influence[]): KeyedNote[] {
  const used = usedReadings(series)
  const engine = (series.fit?.notes ?? []).map(note => ({ note: noteSentences(note, place => `reading ${used[place - 1]?.number ?? place}`) }))
  return [...emptyNote(series), ...setAsideNotes(series), ...bindingNotes(series), ...engine, ...formNote(series), ...influenceNote(series, influences)]
}
