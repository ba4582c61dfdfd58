import { assignLanes } from './lanes'
import { railSpan, type RailEntry, type ValuedEntry } from './layout'
import { linearScale, type Span } from './scale'
import { spread } from './spread'
import { differ, findTies } from './ties'

/** One anion on the lying rail: its marker above the spine, its formula beneath. */
export interface StripEntry {
  entry: ValuedEntry
  x: number
  lane: number
  whisker: Span | null
  /** centre of the formula [px] */
  label: number
}

export interface StripLayout {
  entries: StripEntry[]
  ties: { from: number, to: number }[]
  lanes: number
}

const labelSize = 16
const letterWidth = 0.58
const indexShrink = 0.72
const labelDistance = 14

/** How wide a formula is set, near enough to keep labels apart [px]. */
export function formulaWidth(ion: string): number {
  const [body = '', charge = ''] = ion.split('^')
  const indices = body.replace(/\D/g, '').length + charge.length
  return labelSize * letterWidth * (body.replace(/\d/g, '').length + indices * indexShrink)
}

/** Sets the entries on a lying rail between two margins: lowest value at the left. */
export function layStrip(entries: readonly RailEntry[], [left, right]: Span): StripLayout {
  const valued = entries.filter((entry): entry is ValuedEntry => entry.value !== null).sort((a, b) => a.value - b.value)
  const margin = 60
  const scale = linearScale(railSpan(valued), [left + margin, right - margin])
  const whiskers = valued.map((entry): Span | null =>
    entry.lower === null || entry.upper === null ? null : [scale.pixel(entry.lower), scale.pixel(entry.upper)])
  const stretches = valued.map((entry, index) => {
    const x = scale.pixel(entry.value)
    return { from: Math.min(x - 6, whiskers[index]?.[0] ?? x), to: Math.max(x + 6, whiskers[index]?.[1] ?? x) }
  })
  const lanes = assignLanes(stretches, 3, 3)
  const widths = valued.map(entry => formulaWidth(entry.ion))
  const gaps = widths.slice(1).map((width, index) => (width + widths[index]!) / 2 + labelDistance)
  const labels = spread(valued.map(entry => scale.pixel(entry.value)), gaps, [left + 20, right - 20])
  const ties = findTies(valued.length, (a, b) => differ(valued[a]!, valued[b]!))
  return {
    entries: valued.map((entry, index) => ({ entry, x: scale.pixel(entry.value), lane: lanes[index]!, whisker: whiskers[index]!, label: labels[index]! })),
    ties: ties.map(({ first, last }) => ({ from: labels[first]! - widths[first]! / 2, to: labels[last]! + widths[last]! / 2 })),
    lanes: Math.max(0, ...lanes) + 1,
  }
}
