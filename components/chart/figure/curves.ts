import type { Frame } from './frame'
import { line, plainText, polyline, type PathShape, type Shape } from './shapes'
import type { CurveSamples, FigureContent, Palette } from './types'

const beyond = [1.5, 3.5]
const dashes = [4, 3]

function pixels(curve: CurveSamples, values: readonly number[], frame: Frame, from: number, to: number) {
  return curve.x.flatMap((x, index) => {
    const value = values[index]
    return value === undefined || x < from || x > to ? [] : [[frame.x(x), frame.y(value)] as const]
  })
}

/** The 95 % band of the fit. */
export function bandShapes({ curve, isSketch }: FigureContent, frame: Frame, palette: Palette): Shape[] {
  if (!curve?.lower || !curve.upper || isSketch) return []
  const { min, max } = frame.xAxis
  const upper = pixels(curve, curve.upper, frame, min, max)
  const lower = pixels(curve, curve.lower, frame, min, max).reverse()
  return [{ kind: 'path', d: `${polyline([...upper, ...lower])}Z`, fill: palette.front, opacity: palette.bandOpacity }]
}

/** Solid where readings lie, dotted beyond them. */
export function curveShapes({ curve, readings, isSketch }: FigureContent, frame: Frame, palette: Palette): Shape[] {
  if (!curve) return []
  if (isSketch) {
    const sketch = pixels(curve, curve.y, frame, frame.xAxis.min, frame.xAxis.max)
    return [{ kind: 'path', d: polyline(sketch), stroke: palette.rule, width: 1.7, dash: dashes }]
  }
  const used = readings.filter(reading => !reading.setAside && !reading.apart).map(reading => reading.x)
  const [first, last] = [Math.min(...used), Math.max(...used)]
  const part = (from: number, to: number, dash?: number[]): PathShape[] => {
    const points = pixels(curve, curve.y, frame, from, to)
    return points.length < 2 ? [] : [{ kind: 'path', d: polyline(points), stroke: palette.front, width: 2.4, dash }]
  }
  return [...part(frame.xAxis.min, first, beyond), ...part(first, last), ...part(last, frame.xAxis.max, beyond)]
}

/** The straight line alone, for comparison. */
export function straightLineShapes({ straightLine }: FigureContent, frame: Frame, palette: Palette): Shape[] {
  if (!straightLine) return []
  const points = pixels(straightLine, straightLine.y, frame, frame.xAxis.min, frame.xAxis.max)
  const [start, end] = [points[0], points.at(-1)]
  if (!start || !end) return []
  const x = frame.main.left + 0.12 * frame.main.width
  const y = start[1] + (end[1] - start[1]) * 0.12 + 14
  return [
    { kind: 'path', d: polyline(points), stroke: palette.ink2, width: 1.2, dash: dashes },
    { kind: 'text', runs: plainText('straight line alone'), x, y, align: 'left', size: 12, fill: palette.ink2, isItalic: true, halo: palette.paper },
  ]
}

/** The no-salt line: dots at the fitted cloud point without salt. */
export function noSaltShapes({ curve, isSketch }: FigureContent, frame: Frame, palette: Palette): Shape[] {
  const start = curve?.x[0] === 0 ? curve.y[0] : undefined
  if (start === undefined || isSketch) return []
  const y = frame.y(start)
  return [line(frame.main.left, y, frame.main.left + frame.main.width, y, palette.rule, 1, beyond)]
}
