import type { DerivedQuantity, FittedParameter, Interval } from '#shared/science/fitting/types'
import { concise, fixed } from '#shared/science/notation'

/** A constant as a table prints it. */
export interface ConstantRow {
  name: string
  unit: string
  value: string
  /** null where there is none to print */
  interval: string | null
  level: number | null
}

const fewestDecimals = 2

/** Decimals of the printed estimate, so that interval and estimate end at the same place. */
function decimalsOf(printed: string): number {
  return Math.max(/\.(\d+)/.exec(printed)?.[1]?.length ?? 0, printed.includes('×') ? fewestDecimals : 0)
}

/** An interval in words: 4.07 to 6.15; open where the data set no bound on that side. */
export function intervalText({ lower, upper }: Interval, decimals: number): string | null {
  if (lower === null && upper === null) return null
  if (upper === null) return `above ${fixed(lower ?? 0, decimals)}`
  if (lower === null) return `below ${fixed(upper, decimals)}`
  return `${fixed(lower, decimals)} to ${fixed(upper, decimals)}`
}

/** Fitted constants first, then the derived ones asked for. */
export function constantRows(parameters: readonly FittedParameter[], derived: readonly DerivedQuantity[]): ConstantRow[] {
  const fitted = parameters.map(({ name, unit, estimate, standardError, interval, fixed: isFixed }) => {
    const value = concise(estimate, standardError)
    return {
      name, unit, value: isFixed ? `${value} held` : value, level: interval?.level ?? null,
      interval: interval && estimate !== null ? intervalText(interval, decimalsOf(value)) : null,
    }
  })
  return [...fitted, ...derived.map(({ name, unit, estimate, standardError }) => ({ name, unit, value: concise(estimate, standardError), interval: null, level: null }))]
}
