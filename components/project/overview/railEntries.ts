import type { SeriesSummary } from '#shared/contracts/series'
import { pooledShift } from '#shared/science/pooling/pooled-shift'
import { inRailOrder, type RailEntry } from '~~/components/chart/rail/layout'

const normal97_5 = 1.959964

/** Anions by their shift at x over all labs, from the top of the rail down; whiskers hold 95 % of what another lab would find. */
export function railEntries(series: readonly SeriesSummary[], x: number): RailEntry[] {
  const ions = [...new Set(series.map(({ salt }) => salt.anion))]
  return inRailOrder(ions.map((ion): RailEntry => {
    const own = series.filter(({ salt }) => salt.anion === ion).map(({ campaign, fit }) => ({ lab: campaign.lab.id, fit }))
    const pooled = pooledShift(own, x)
    if (!pooled) return { ion, value: null, lower: null, upper: null, standardError: null }
    const reach = normal97_5 * Math.hypot(pooled.betweenLabs, pooled.standardError)
    return { ion, value: pooled.value, lower: pooled.value - reach, upper: pooled.value + reach, standardError: pooled.standardError }
  }))
}
