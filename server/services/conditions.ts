import type { campaign, sample } from '~~/server/database/schema'

interface Setting {
  campaign: typeof campaign.$inferSelect
  sample: typeof sample.$inferSelect | null
}

const criteria: Record<NonNullable<typeof campaign.$inferSelect.criterion>, string> = {
  onset: 'onset of clouding',
  fraction: 'a fraction of the transmittance',
  steepest: 'steepest point',
  departure: 'first departure from the baseline',
  sigmoid: 'midpoint of a sigmoid',
}

/** Sample, concentration, direction, rate and criterion of a campaign in one line. Rate in K/min, concentration in g/L. */
export function conditionsOf({ campaign, sample }: Setting): string {
  const { polymerConcentration, solvent, buffer, clouds, rate, criterion, criterionFraction } = campaign
  const amount = polymerConcentration === null ? '' : `, ${polymerConcentration} g L⁻¹`
  const medium = [solvent, buffer].filter(Boolean).join(', ')
  const by = criterion === 'fraction' && criterionFraction ? `${criterionFraction * 100} % transmittance` : criterion && criteria[criterion]
  return [
    sample ? `${sample.name}${amount} in ${medium}` : `sample not stated${amount}, in ${medium}`,
    clouds === 'on-heating' ? 'clouds on heating' : 'clouds on cooling',
    rate === null ? 'rate not stated' : `${rate} K min⁻¹`,
    by,
  ].filter(Boolean).join('; ')
}
