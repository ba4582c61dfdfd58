import { concise, fixed } from '#shared/science/notation'
import { exportedHeadings } from '#shared/tables/columns/own-export'
import type { Exported } from './exported'

export type Value = string | number | null
export interface Table { headings: readonly string[], rows: Value[][] }

const units: Readonly<Record<string, string>> = { 'concentration': 'mol/L', 'cloud point': '°C', 'standard uncertainty': 'K', 'rate': 'K/min' }
const headingOf = (name: string, scale: Exported['scale']) => {
  const unit = name === 'concentration' ? scale : units[name]
  return unit ? `${name} (${unit})` : name
}

function readingRow(one: Exported, { id, x, y, sd, n, direction, limit, batch, setAside, note, blank }: Exported['readings'][number]): Value[] {
  const { rate = null, ph = null, measuredOn = null } = one.further.get(id) ?? {}
  return [blank ? 'blank' : one.salt, x, y, sd, n, direction, limit, batch?.label ?? null, measuredOn, rate, ph, setAside?.reason ?? null, note]
}

/** Readings of one series under the headings that an import recognises. */
export function readingsTable(one: Exported): Table {
  return { headings: exportedHeadings.map(name => headingOf(name, one.scale)), rows: one.readings.map(reading => readingRow(one, reading)) }
}

/** Readings of many series, each row with its lab and campaign; a blank once a campaign, however many series share it. */
export function manyReadings(all: readonly Exported[]): Table {
  const seen = new Set<string>()
  const rows = all.flatMap(one => one.readings.filter(({ id }) => !seen.has(id) && seen.add(id)).map(reading => [one.lab, one.campaign, ...readingRow(one, reading)]))
  return { headings: ['lab', 'campaign', ...exportedHeadings.map(name => headingOf(name, all[0]?.scale ?? 'mol/L'))], rows }
}

export interface ConstantLine { one: Exported, name: string, unit: string, estimate: number | null, standardError: number | null, lower: number | null, upper: number | null, printed: string, interval: string }

/** A constant a line; one that the readings do not determine has a dash and no numbers. */
export function constantLines(all: readonly Exported[]): ConstantLine[] {
  return all.flatMap(one => (one.fit?.parameters ?? []).map(({ name, unit, estimate, standardError, interval, fixed: isFixed }) => {
    const { lower = null, upper = null } = interval ?? {}
    const printed = concise(estimate, standardError)
    const decimals = Math.max(2, /\.(\d+)/.exec(printed)?.[1]?.length ?? 0)
    const ends = [lower, upper].map(end => end === null ? 'open' : fixed(end, decimals))
    return {
      one, name, unit, estimate, standardError, lower, upper, printed: isFixed ? `${printed} held` : printed,
      interval: estimate === null || !interval || (lower === null && upper === null) ? '' : ends.join(' to '),
    }
  }))
}

export function constantsTable(all: readonly Exported[]): Table {
  return {
    headings: ['lab', 'campaign', 'salt', 'revision', 'model', 'constant', 'unit', 'estimate', 'standard error', '95 % lower', '95 % upper', 'engine', 'notes'],
    rows: constantLines(all).map(({ one, name, unit, estimate, standardError, lower, upper }) => [
      one.lab, one.campaign, one.salt, one.revision, one.fit!.model, name, unit, estimate, standardError, lower, upper, one.fit!.engine.version, one.fit!.notes.map(({ code }) => code).join(' '),
    ]),
  }
}
