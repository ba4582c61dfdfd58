import type { SeriesSummary } from '#shared/contracts/series'
import { curveAt } from '#shared/science/fitting'
import type { Attention } from '#shared/science/pooling/findings'
import type { SharedAxes } from './axes'

/** What one small panel draws, in percent of its width and height. */
export interface PanelDrawing {
  curve: string
  /** strokes without length: round dots at any size of the panel */
  dots: string
  setAside: { x: number, y: number }[]
  level: number | null
}

const curveSteps = 40
const percent = (value: number) => value.toFixed(2)

export function panelDrawing(series: SeriesSummary, axes: SharedAxes): PanelDrawing {
  const px = (x: number) => 100 * (x - axes.x[0]) / (axes.x[1] - axes.x[0])
  const py = (y: number) => 100 * (axes.y[1] - y) / (axes.y[1] - axes.y[0])
  const drawn = series.readings.filter(reading => !reading.setAside)
  return {
    curve: curvePath(series, px, py),
    dots: drawn.map(({ x, y }) => `M${percent(px(x))} ${percent(py(y))}h0`).join(''),
    setAside: series.readings.filter(reading => reading.setAside).map(({ x, y }) => ({ x: px(x), y: py(y) })),
    level: axes.level === null ? null : py(axes.level),
  }
}

function curvePath(series: SeriesSummary, px: (x: number) => number, py: (y: number) => number): string {
  const reach = Math.max(0, ...series.readings.map(({ x }) => x))
  const xs = Array.from({ length: curveSteps + 1 }, (_, index) => reach * index / curveSteps)
  const ys = series.fit && curveAt(series.fit, xs)
  if (!ys) return ''
  return xs.map((x, index) => `${index === 0 ? 'M' : 'L'}${percent(px(x))} ${percent(py(ys[index]!))}`).join('')
}

const attentionWords: Record<Attention, string> = {
  'concentration-low': '[M] too low?',
  'concentration-high': '[M] too high?',
  'no-blank': 'no blank',
}

/** Why a panel is empty or marked, in the few words it has room for. */
export function remarkOf(series: SeriesSummary, attention: Attention | undefined): string | null {
  if (attention) return attentionWords[attention]
  if (series.fit) return null
  const measured = series.readings.filter(reading => !reading.blank).length
  if (measured === 0) return 'no readings'
  return measured === 1 ? '1 reading' : `${measured} readings`
}
