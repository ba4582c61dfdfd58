import type { Series } from '#shared/contracts/series'
import { curveAt } from '#shared/science/fitting'
import { signed } from '~~/components/chart/rail/signed'
import type { SeriesReading } from './fitInput'

/** A reading as the table prints it: texts of equal decimals, the residual also as a bar. */
export interface ReadingRow {
  reading: SeriesReading
  x: string
  y: string
  residual: string
  /** −1 to 1 of the largest residual in use; null without a fit, and of a reading set aside */
  bar: number | null
  note: string
  /** letter of its margin note */
  key: string | null
}

const fewestDecimals = 2

function decimalsOf(values: readonly number[]): number {
  return Math.max(fewestDecimals, ...values.map(value => String(Number(value.toPrecision(12))).split('.')[1]?.length ?? 0))
}

const limitWords: Record<SeriesReading['limit'], string> = {
  'exact': '',
  'below': 'cloudy already below',
  'above': 'still clear here',
  'salt-precipitated': 'salt came out',
}

/** Letters for the readings that are set aside, by their number. */
export function keysOf(readings: readonly SeriesReading[]): Map<number, string> {
  const aside = readings.filter(reading => reading.setAside)
  return new Map(aside.map((reading, index) => [reading.number, String.fromCharCode(97 + index)]))
}

/** The value before the last correction, where the cloud point or the concentration was corrected. */
function formerWords({ x, y, changed }: SeriesReading): string {
  if (!changed) return ''
  const print = (value: number) => value.toFixed(decimalsOf([value]))
  return [changed.x !== x && `was at ${print(changed.x)} M`, changed.y !== y && `was ${print(changed.y)}`].filter(Boolean).join(', ')
}

/** A reading of the other branch is kept and drawn; it takes no part in the fit. */
function branchWords({ direction, limit, setAside, entersFit }: SeriesReading): string {
  return entersFit || setAside || limit !== 'exact' ? '' : `on ${direction}, not in the fit`
}

function noteOf(reading: SeriesReading): string {
  return [reading.blank && 'blank', limitWords[reading.limit], branchWords(reading), formerWords(reading), reading.note].filter(Boolean).join('; ')
}

export function readingRows({ readings, fit }: Series): ReadingRow[] {
  const fitted = fit && curveAt(fit, readings.map(({ x }) => x))
  const residuals = readings.map(({ y, entersFit, setAside }, index) => fitted && (entersFit || setAside) ? y - fitted[index]! : null)
  const largest = Math.max(1e-9, ...residuals.map((residual, index) => readings[index]!.setAside ? 0 : Math.abs(residual ?? 0)))
  const [xDecimals, yDecimals] = [decimalsOf(readings.map(({ x }) => x)), decimalsOf(readings.map(({ y }) => y))]
  const keys = keysOf(readings)
  return readings.map((reading, index) => {
    const residual = residuals[index]!
    return {
      reading,
      x: reading.x.toFixed(xDecimals),
      y: reading.y.toFixed(yDecimals),
      residual: residual === null ? '' : signed(residual, yDecimals),
      bar: residual === null || reading.setAside ? null : residual / largest,
      note: noteOf(reading),
      key: keys.get(reading.number) ?? null,
    }
  })
}
