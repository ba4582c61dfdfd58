import { concentrationAxis, residualAxis, temperatureAxis, type Axis } from './axis'
import type { CurveSamples, FigureContent } from './types'

export interface Rectangle {
  left: number
  top: number
  width: number
  height: number
}

/** Where everything stands in pixels: two plots on one concentration axis. */
export interface Frame {
  width: number
  height: number
  main: Rectangle
  residual: Rectangle
  /** false: no curve, and so no strip of residuals */
  hasResiduals: boolean
  xAxis: Axis
  yAxis: Axis
  residualAxis: Axis & { limit: number }
  /** concentration → pixel */
  x: (value: number) => number
  /** temperature → pixel */
  y: (value: number) => number
  /** residual → pixel, unclamped */
  r: (value: number) => number
}

const margins = { left: 40, top: 26, right: 52, bottom: 42 } as const
const strip = { height: 92, gap: 16 } as const
const narrow = 420

function scale(axis: Axis, from: number, to: number) {
  const factor = (to - from) / (axis.max - axis.min)
  return (value: number) => from + (value - axis.min) * factor
}

/** Linear interpolation on a curve's samples; beyond them the nearest end. */
export function sampleAt(curve: CurveSamples, values: readonly number[], x: number): number {
  const last = curve.x.length - 1
  const above = curve.x.findIndex(sample => sample >= x)
  if (above === 0) return values[0] ?? NaN
  if (above < 0) return values[last] ?? NaN
  const [x0 = 0, x1 = 1] = [curve.x[above - 1], curve.x[above]]
  const [y0 = NaN, y1 = NaN] = [values[above - 1], values[above]]
  return y0 + (y1 - y0) * (x - x0) / (x1 - x0)
}

/** Measured minus fitted, for every reading on the curve's domain; none without a curve. */
export function residualsOf(content: FigureContent) {
  const { curve } = content
  if (!curve || content.isSketch) return []
  return content.readings
    .filter(reading => (reading.limit ?? 'exact') === 'exact' && !reading.apart)
    .map(reading => ({ reading, residual: reading.y - sampleAt(curve, curve.y, reading.x) }))
}

function temperatures(content: FigureContent): number[] {
  const read = content.readings.map(reading => reading.y)
  const drawn = content.curve ? [...content.curve.y, ...(content.curve.lower ?? []), ...(content.curve.upper ?? [])] : []
  const all = read.length > 0 ? [...read, ...within(drawn, read)] : drawn
  return all.length > 0 ? all : [30, 32]
}

/** A wide band must not squeeze the readings: what it adds is capped at half the readings' span on either side. */
function within(values: readonly number[], readings: readonly number[]): number[] {
  const lowest = Math.min(...readings)
  const highest = Math.max(...readings)
  const room = Math.max(highest - lowest, 0.2) / 2
  return values.map(value => Math.min(Math.max(value, lowest - room), highest + room))
}

/** Lays a figure out in a given size. */
export function frameOf(content: FigureContent, width: number, height: number): Frame {
  // Without a curve there is nothing to be left over from: the strip gives its place to the readings.
  const { gap, height: stripHeight } = content.curve ? strip : { gap: 0, height: 0 }
  const mainHeight = height - margins.top - gap - stripHeight - margins.bottom
  const plotWidth = Math.max(width - margins.left - margins.right, 80)
  const main = { left: margins.left, top: margins.top, width: plotWidth, height: Math.max(mainHeight, 80) }
  const residual = { left: main.left, top: main.top + main.height + gap, width: plotWidth, height: stripHeight }
  const fitted = residualsOf(content).filter(({ reading }) => !reading.setAside).map(({ residual }) => residual)
  const xAxis = concentrationAxis([...content.readings, ...content.gaps].map(({ x }) => x), width < narrow ? 5 : 6)
  const yAxis = temperatureAxis(temperatures(content), content.clouds, width < narrow ? 5 : 6)
  const rAxis = residualAxis(fitted)
  return {
    width, height, main, residual, hasResiduals: content.curve !== null, xAxis, yAxis, residualAxis: rAxis,
    x: scale(xAxis, main.left, main.left + main.width),
    y: scale(yAxis, main.top + main.height, main.top),
    r: scale(rAxis, residual.top + residual.height, residual.top),
  }
}
