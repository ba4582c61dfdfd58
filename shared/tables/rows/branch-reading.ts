import type { Branch } from '../columns/branches'
import { spreadOf, type Decimal } from '../cells/decimal'
import { taken, type Finding, type ReadCell } from '../readers/finding'
import type { Plan, PlannedColumn } from '../columns/plan'
import { readTemperature, readUncertainty, type Temperature } from '../readers/temperature'
import type { FoundReading } from '../types'

/** A cloud point with its uncertainty, before the rest of its row is known. */
export type Point = Pick<FoundReading, 'column' | 'y' | 'sd' | 'sdGiven' | 'sdMeaning' | 'n' | 'limit'>

type Spread = Pick<FoundReading, 'sd' | 'sdGiven' | 'sdMeaning'>

/** Twelve digits are more than any uncertainty has; the rest is rounding. */
const withoutDust = (value: number) => Number(value.toPrecision(12))

/**
 * The uncertainty as it is used: a standard uncertainty as it stands, a standard deviation of n replicates by √n.
 * Without n the standard deviation is kept as given and gives no standard uncertainty.
 */
function spreadFrom(given: number | null, meaning: FoundReading['sdMeaning'], n: number | null): Spread {
  if (given === null) return { sd: null, sdGiven: null, sdMeaning: null }
  if (meaning !== 'sd-of-replicates') return { sd: given, sdGiven: given, sdMeaning: meaning }
  return { sd: n === null ? null : withoutDust(given / Math.sqrt(n)), sdGiven: given, sdMeaning: meaning }
}

interface PointCell { column: PlannedColumn, value: Temperature }

function repeatsPoint(cells: readonly PointCell[]): Point {
  const { mean, sd, n } = spreadOf(cells.map(({ value }) => value.y))
  const limit = cells.find(({ value }) => value.limit !== 'exact')?.value.limit ?? 'exact'
  return { column: cells[0]?.column.index ?? 0, y: mean.value, n, limit, ...spreadFrom(sd, 'sd-of-replicates', n), sdGiven: sd === null ? null : withoutDust(sd) }
}

function statedMeaning({ isConcise }: NonNullable<Temperature['stated']>, column: PlannedColumn): FoundReading['sdMeaning'] {
  // 31.2(1) gives a standard uncertainty by its own definition.
  return isConcise ? 'standard-uncertainty' : column.uncertaintyMeaning
}

function singlePoint({ column, value }: PointCell, branch: Branch, uncertainty: Decimal | null, n: number | null): Point {
  const own = value.stated ? spreadFrom(value.stated.number.value, statedMeaning(value.stated, column), n) : null
  const beside = spreadFrom(uncertainty?.value ?? null, branch.uncertainty?.uncertaintyMeaning ?? null, n)
  return { column: column.index, y: value.y.value, n, limit: value.limit, ...(own ?? beside) }
}

/** Reads the cells of one branch; null where none of them gives a number. */
export function pointOf(cellAt: (column: number) => ReadCell, branch: Branch, plan: Plan, n: number | null): { point: Point | null, findings: Finding[] } {
  const read = branch.columns.map(column => ({ column, found: readTemperature(cellAt(column.index), column, plan) }))
  const cells = read.flatMap(({ column, found }) => found.value ? [{ column, value: found.value }] : [])
  const findings = read.flatMap(({ found }) => found.findings)
  const [first] = cells
  if (!first) return { point: null, findings }
  if (branch.columns.length > 1) return { point: repeatsPoint(cells), findings }
  const spread = branch.uncertainty ? readUncertainty(cellAt(branch.uncertainty.index), branch.uncertainty, plan) : { value: null, findings: [] }
  const isUndetermined = branch.uncertainty?.uncertaintyMeaning === 'sd-of-replicates' && spread.value !== null && n === null
  const about = isUndetermined && plan.columns.some(({ meaning }) => meaning === 'samples')
    ? [taken(branch.uncertainty?.index ?? null, 'no-uncertainty', 'No number of samples', 'A standard deviation needs it to become a standard uncertainty; it is kept as given.')]
    : []
  return { point: singlePoint(first, branch, spread.value, n), findings: [...findings, ...spread.findings, ...about] }
}
