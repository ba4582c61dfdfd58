/** Where the small picture of moved constants puts things. */
import type { ProjectFront } from '#shared/contracts/front'

type Moved = ProjectFront['moved'][number]

export interface MovedFigure {
  name: string
  unit: string
  rows: { moved: Moved, y: number, before: Whisker, now: Whisker }[]
  ticks: { x: number, text: string }[]
  height: number
}

interface Whisker { x: number, from: number, to: number }

const left = 96
const right = 292
const rowHeight = 30
const usefulSteps = [1, 2, 2.5, 5, 10]
const wantedTicks = 4

function stepFor(span: number): number {
  const raw = span / wantedTicks
  const power = 10 ** Math.floor(Math.log10(raw))
  return power * (usefulSteps.find(step => step * power >= raw) ?? 10)
}

/** Constants of one name on a common axis: then in grey, now in colour, each with its standard error. Null without any. */
export function movedFigure(all: readonly Moved[]): MovedFigure | null {
  const name = all[0]?.name
  const rows = all.filter(moved => moved.name === name)
  if (!name || rows.length === 0) return null
  const ends = rows.flatMap(({ before, now }) => [before, now].flatMap(({ estimate, standardError }) => [estimate - (standardError ?? 0), estimate + (standardError ?? 0)]))
  const [low, high] = [Math.min(...ends), Math.max(...ends)]
  const step = stepFor(Math.max(high - low, Math.abs(high) * 1e-6, 1e-9))
  const first = Math.floor(low / step) * step
  const last = Math.max(Math.ceil(high / step) * step, first + step)
  const x = (value: number) => left + (value - first) / (last - first) * (right - left)
  const whisker = ({ estimate, standardError }: Moved['now']): Whisker => ({ x: x(estimate), from: x(estimate - (standardError ?? 0)), to: x(estimate + (standardError ?? 0)) })
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9))
  return {
    name, unit: rows[0]!.unit, height: rows.length * rowHeight + 30,
    rows: rows.map((moved, index) => ({ moved, y: 8 + index * rowHeight, before: whisker(moved.before), now: whisker(moved.now) })),
    ticks: Array.from({ length: Math.round((last - first) / step) + 1 }, (_, index) => ({ x: x(first + index * step), text: (first + index * step).toFixed(decimals).replace('-', '−') })),
  }
}
