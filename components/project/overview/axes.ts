import type { SeriesSummary } from '#shared/contracts/series'
import { curveAt } from '#shared/science/fitting'
import { niceSpan, ticks, type Span } from '~~/components/chart/rail/scale'

/** One pair of axes for all panels: concentration [mol/L] and cloud point [°C]. */
export interface SharedAxes {
  x: Span
  y: Span
  xTicks: number[]
  yTicks: number[]
  /** cloud point without salt, rounded; dotted in every panel [°C] */
  level: number | null
}

const margin = 0.06
const tickDistance = 0.18

/** Axes that hold every reading drawn in any panel. */
export function sharedAxes(series: readonly SeriesSummary[]): SharedAxes {
  const readings = series.flatMap(one => one.readings)
  const xs = readings.map(({ x }) => x)
  const ys = readings.map(({ y }) => y)
  const x = niceSpan([0, Math.max(...xs, 0.1)], 2)
  const [low, high] = ys.length > 0 ? [Math.min(...ys), Math.max(...ys)] : [20, 40]
  const room = Math.max(high - low, 1) * margin
  const y: Span = [low - room, high + room * 2]
  const level = levelOf(series)
  return { x: [x[0], x[1] * 1.04], y, xTicks: ticks(x, 2), yTicks: yTicksOf(y, level), level }
}

function levelOf(series: readonly SeriesSummary[]): number | null {
  const levels = series.flatMap(({ fit }) => (fit && curveAt(fit, [0])) ?? [])
  return levels.length > 0 ? Math.round(levels.reduce((sum, value) => sum + value, 0) / levels.length) : null
}

/** The level itself and round values that keep clear of it. */
function yTicksOf(y: Span, level: number | null): number[] {
  const span = y[1] - y[0]
  const round = ticks(y, 4)
  if (level === null) return round
  return [...round.filter(value => Math.abs(value - level) > tickDistance * span), level].sort((a, b) => a - b)
}
