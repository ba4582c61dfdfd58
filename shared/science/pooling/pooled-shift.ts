import type { DrawableFit } from '../fitting'
import { fixedEffect, randomEffects, type Pooled } from './random-effects'
import { shiftAt } from './shift'

/** One fitted series of one anion, as pooling needs it. */
export interface PoolableSeries {
  lab: string
  fit: DrawableFit | null
}

/**
 * Shift of one anion at x over all labs: campaigns are averaged within their lab, labs are pooled with the scatter between them.
 *
 * @param x concentration [mol/L]
 * @returns null where no series has a usable fit
 */
export function pooledShift(series: readonly PoolableSeries[], x: number): Pooled | null {
  const byLab = new Map<string, { value: number, standardError: number }[]>()
  for (const { lab, fit } of series) {
    const shift = fit && shiftAt(fit, x)
    if (!shift?.standardError) continue
    byLab.set(lab, [...byLab.get(lab) ?? [], { value: shift.value, standardError: shift.standardError }])
  }
  return randomEffects([...byLab.values()].flatMap(campaigns => fixedEffect(campaigns) ?? []))
}
