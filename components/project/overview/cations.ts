import type { SeriesSummary } from '#shared/contracts/series'

const sodium = 'Na^+'

/** The cation that most series of an anion have; sodium where as many have it. */
function usualCation(series: readonly SeriesSummary[]): string {
  const counts = new Map<string, number>()
  for (const { salt } of series) counts.set(salt.cation, (counts.get(salt.cation) ?? 0) + 1)
  const most = Math.max(...counts.values())
  return counts.get(sodium) === most ? sodium : [...counts].find(([, count]) => count === most)![0]
}

/**
 * Series as the overview lays them out by anion. The salts of an anion's usual cation stand for the anion; a salt of another
 * cation stands under its own formula, so that it neither hides behind them nor is pooled with them.
 */
export function apartByCation(series: readonly SeriesSummary[]): SeriesSummary[] {
  const byAnion = new Map<string, SeriesSummary[]>()
  for (const one of series) byAnion.set(one.salt.anion, [...byAnion.get(one.salt.anion) ?? [], one])
  const usual = new Map([...byAnion].map(([anion, own]) => [anion, usualCation(own)]))
  return series.map(one => one.salt.cation === usual.get(one.salt.anion) ? one : { ...one, salt: { ...one.salt, anion: one.salt.formula } })
}
