import { assignLanes } from './lanes'
import { leaderPath } from './paths'
import { linearScale, niceSpan, ticks, type LinearScale, type Span } from './scale'
import { spread } from './spread'
import { differ, findTies, type Tie } from './ties'

/** One anion on the rail: its value with the ends of its whisker; null where the readings give none. */
export interface RailEntry {
  ion: string
  value: number | null
  lower: number | null
  upper: number | null
  standardError: number | null
}

/** An entry that has a value. */
export interface ValuedEntry extends RailEntry {
  value: number
}

export interface PlacedEntry {
  entry: RailEntry
  /** centre of the chip [px] */
  chip: number
  mark: { x: number, y: number, whisker: Span | null, leader: string } | null
}

export interface RailGeometry {
  width: number
  /** x of the spine's line [px] */
  spine: number
  /** towards the chips: 1 to the right, −1 to the left */
  side: 1 | -1
  chipLeft: number
  chipWidth: number
  /** x of the first bracket of ties [px]; each further one stands `bracketPitch` further out */
  bracket: number
}

export const chipGap = 34
export const chipHeight = 28
export const bracketPitch = 15
const markDistance = 12
const lanePitch = 12.5
const mostLanes = 3
const markReach = 6

/** Beside a figure chips stand at the left; beside small multiples the rail is mirrored and its chips head the rows. */
export const railGeometries = {
  plain: { width: 268, spine: 222, side: -1, chipLeft: 24, chipWidth: 142, bracket: 14 },
  mirrored: { width: 250, spine: 48, side: 1, chipLeft: 144, chipWidth: 88, bracket: 240 },
  mirroredNarrow: { width: 202, spine: 48, side: 1, chipLeft: 104, chipWidth: 82, bracket: 193 },
} as const satisfies Record<string, RailGeometry>
export type RailVariant = keyof typeof railGeometries

export interface RailLayout {
  entries: PlacedEntry[]
  ticks: { value: number, y: number }[]
  ties: (Tie & { from: number, to: number, x: number })[]
  /** the geometry's width, and more where ties need further brackets [px] */
  width: number
  /** y where the value is zero, null when the span does not hold it */
  zero: number | null
}

export interface RailStretch {
  top: number
  bottom: number
  /** centres of the chips where the rows beside the rail decide them [px] */
  rows?: readonly number[]
}

const hasValue = (entry: RailEntry): entry is ValuedEntry => entry.value !== null

/** From the highest value down; entries without a value keep their order at the foot. */
export function inRailOrder(entries: readonly RailEntry[]): RailEntry[] {
  const valued = entries.filter(hasValue).sort((a, b) => b.value - a.value)
  return [...valued, ...entries.filter(entry => !hasValue(entry))]
}

/** The span of all whiskers and zero, widened to round ends. */
export function railSpan(entries: readonly RailEntry[]): Span {
  const ends = entries.flatMap(entry => hasValue(entry) ? [entry.value, entry.lower ?? entry.value, entry.upper ?? entry.value] : [])
  return niceSpan([Math.min(0, ...ends), Math.max(0, ...ends)], 8)
}

/** Sets entries (in rail order) on the rail: markers at their values, chips beside them, ties between them. */
export function layRail(entries: readonly RailEntry[], geometry: RailGeometry, stretch: RailStretch): RailLayout {
  const span = railSpan(entries)
  const scale = linearScale(span, [stretch.bottom, stretch.top])
  const valued = entries.filter(hasValue)
  const chips = stretch.rows ?? placeChips(entries, scale, stretch)
  const whiskers = valued.map(entry => whiskerOf(entry, scale))
  const lanes = assignLanes(valued.map((entry, index) => drawnStretch(entry, whiskers[index]!, scale)), mostLanes)
  const marks = valued.map((entry, index) => mark(geometry, scale.pixel(entry.value), chips[index]!, lanes[index]!, whiskers[index]!))
  const ties = findTies(valued.length, (a, b) => differ(valued[a]!, valued[b]!))
  return {
    entries: entries.map((entry, index) => ({ entry, chip: chips[index]!, mark: marks[index] ?? null })),
    ticks: ticks(span, 8).map(value => ({ value, y: scale.pixel(value) })),
    width: geometry.width + bracketPitch * Math.max(0, ...ties.map(tie => tie.lane)),
    ties: ties.map(tie => ({ ...tie, from: chips[tie.first]!, to: chips[tie.last]!, x: geometry.bracket + geometry.side * tie.lane * bracketPitch })),
    zero: span[0] <= 0 && span[1] >= 0 ? scale.pixel(0) : null,
  }
}

/** Chips as near their markers as 34 px allow; those without a value follow beneath. */
function placeChips(entries: readonly RailEntry[], scale: LinearScale, { top, bottom }: RailStretch): number[] {
  const wanted = entries.map(entry => hasValue(entry) ? scale.pixel(entry.value) : bottom)
  return spread(wanted, chipGap, [top + chipHeight / 2, bottom - chipHeight / 2])
}

function whiskerOf(entry: ValuedEntry, scale: LinearScale): Span | null {
  if (entry.lower === null || entry.upper === null) return null
  return [scale.pixel(entry.upper), scale.pixel(entry.lower)]
}

function drawnStretch(entry: ValuedEntry, whisker: Span | null, scale: LinearScale) {
  const y = scale.pixel(entry.value)
  return { from: Math.min(y - markReach, whisker?.[0] ?? y), to: Math.max(y + markReach, whisker?.[1] ?? y) }
}

function mark(geometry: RailGeometry, y: number, chip: number, lane: number, whisker: Span | null) {
  const x = geometry.spine + geometry.side * (markDistance + lane * lanePitch)
  const chipEdge = geometry.side === 1 ? geometry.chipLeft - 2 : geometry.chipLeft + geometry.chipWidth + 2
  return { x, y, whisker, leader: leaderPath(x + geometry.side * markReach, y, chipEdge, chip) }
}
