import type { SeriesSummary } from '#shared/contracts/series'
import type { ComparedSeries } from '#shared/science/pooling/findings'

/** A series of the project as the comparison of labs needs it. */
export function comparedOf({ id, salt, campaign, readings, fit, stock }: SeriesSummary): ComparedSeries {
  const measured = readings.filter(reading => !reading.blank)
  return {
    id,
    lab: campaign.lab.name,
    campaign: campaign.name,
    ion: salt.anion,
    fit,
    measured: measured.length,
    hasBlank: readings.some(reading => reading.x === 0 && !reading.setAside),
    reach: Math.max(0, ...measured.map(({ x }) => x)),
    stockAge: stock?.ageAtUse ?? null,
  }
}
