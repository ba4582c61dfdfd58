import type { SeriesSummary } from '#shared/contracts/series'
import { counted } from './words'

/** What the project holds, in one line; a blank shared by several series counts once. */
export function summaryLine(series: readonly SeriesSummary[]): string {
  const measured = series.filter(({ readings }) => readings.some(reading => !reading.blank))
  const readings = new Map(series.flatMap(one => one.readings.map(reading => [reading.id, reading] as const)))
  const setAside = [...readings.values()].filter(reading => reading.setAside).length
  const salts = new Set(series.map(({ salt }) => salt.formula)).size
  const campaigns = new Set(series.map(({ campaign }) => campaign.id)).size
  return `${series.length} series, ${measured.length} with readings: ${counted(salts, 'salt')}, ${counted(campaigns, 'campaign')}. ${readings.size} readings, ${setAside} set aside.`
}
