import { residualsOf, sampleAt } from './frame'
import type { FigureContent, FigureReading } from './types'

/** A reading with what the fit says of it; null without a curve. */
export interface FigureRow extends FigureReading {
  fitted: number | null
  residual: number | null
}

/** The readings in the order of concentration, each with its fitted value. */
export function figureRows(content: FigureContent): FigureRow[] {
  const residuals = new Map(residualsOf(content).map(({ reading, residual }) => [reading.number, residual]))
  const { curve, isSketch } = content
  return [...content.readings]
    .sort((a, b) => a.x - b.x || a.number - b.number)
    .map(reading => ({
      ...reading,
      fitted: curve && !isSketch ? sampleAt(curve, curve.y, reading.x) : null,
      residual: residuals.get(reading.number) ?? null,
    }))
}

/** Why a reading does not count, in words; empty when it does. */
export function standing(reading: FigureReading): string {
  if (reading.setAside) return 'set aside'
  if (reading.apart) return 'on the other branch, not in the fit'
  const words = { 'exact': '', 'below': 'cloud point lies below', 'above': 'cloud point lies above', 'salt-precipitated': 'salt precipitated' } as const
  return words[reading.limit ?? 'exact'] || (reading.blank || reading.x === 0 ? 'blank' : '')
}

const header = ['number', 'concentration / mol L-1', 'cloud point / C', 'standard uncertainty / K', 'independent samples', 'fitted / C', 'residual / K', 'standing']

function cell(value: string | number | null | undefined): string {
  const text = value === null || value === undefined ? '' : String(value)
  return /[",\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}

/** The readings as comma-separated values, all digits kept. */
export function figureCsv(rows: readonly FigureRow[]): string {
  const lines = rows.map(row => [row.number, row.x, row.y, row.sd, row.n, row.fitted, row.residual, standing(row)].map(cell).join(','))
  return [header.join(','), ...lines, ''].join('\r\n')
}
