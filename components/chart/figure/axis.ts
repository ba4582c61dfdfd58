/** One axis: its domain in data and where the ticks stand. */
export interface Axis {
  min: number
  max: number
  ticks: number[]
  /** decimals that tell the ticks apart */
  decimals: number
}

/** The step of 1, 2 or 5 times a power of ten that cuts a span into at most `most` parts. */
export function niceStep(span: number, most: number): number {
  const raw = span / most
  const power = 10 ** Math.floor(Math.log10(raw))
  const factor = [1, 2, 5, 10].find(candidate => candidate * power >= raw * (1 - 1e-9)) ?? 10
  return factor * power
}

/** An axis over a domain that keeps its ends, with ticks at multiples of a nice step inside it. */
export function axisOver(min: number, max: number, mostTicks: number): Axis {
  const step = niceStep(max - min, mostTicks)
  const first = Math.ceil(min / step - 1e-9)
  const last = Math.floor(max / step + 1e-9)
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9))
  const ticks = Array.from({ length: Math.max(0, last - first + 1) }, (_, index) => Number(((first + index) * step).toFixed(decimals)))
  return { min, max, ticks, decimals }
}

/** Concentrations run from zero to the half step after the last reading. */
export function concentrationAxis(xs: readonly number[], mostTicks: number): Axis {
  const largest = Math.max(0, ...xs)
  if (largest === 0) return axisOver(0, 1, mostTicks)
  const half = niceStep(largest, 6) / 2
  return axisOver(0, Math.ceil(largest / half - 1e-9) * half, mostTicks)
}

/** Room above and below the data, as parts of their span: the stipple and the words stand in it. */
const headroom = { cloudy: 0.42, clear: 0.28 } as const
const smallestSpan = 0.2

/** The temperature axis leaves more room on the cloudy side. */
export function temperatureAxis(ys: readonly number[], clouds: 'on-heating' | 'on-cooling', mostTicks: number): Axis {
  const lowest = Math.min(...ys)
  const highest = Math.max(...ys)
  const span = Math.max(highest - lowest, smallestSpan)
  const [below, above] = clouds === 'on-heating' ? [headroom.clear, headroom.cloudy] : [headroom.cloudy, headroom.clear]
  return axisOver(lowest - below * span, highest + above * span, mostTicks)
}

/** Below this no thermometer tells residuals apart [K]; a curve through every reading leaves only rounding. */
const finestLimit = 0.01

/** A residual axis symmetric about zero; `limit` is the dotted line, readings beyond `max` are drawn at the edge. */
export function residualAxis(residuals: readonly number[]): Axis & { limit: number } {
  const largest = Math.max(0, ...residuals.map(Math.abs))
  const limit = largest === 0 ? 0.1 : Math.max(niceStep(largest, 1), finestLimit)
  const decimals = Math.max(0, -Math.floor(Math.log10(limit) + 1e-9))
  return { min: -1.5 * limit, max: 1.5 * limit, ticks: [-limit, 0, limit], decimals, limit }
}
