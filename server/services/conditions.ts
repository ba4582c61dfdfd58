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

function criterionWords({ criterion, criterionFraction }: Setting['campaign']): string | null {
  return criterion === 'fraction' && criterionFraction ? `${criterionFraction * 100} % transmittance` : criterion && criteria[criterion]
}

const rateWords = (rate: number | null) => rate === null ? 'rate not stated' : `${rate} K min⁻¹`

/** Rate and criterion, for a line of a table. */
export function shortConditions(head: Setting['campaign']): string {
  return [rateWords(head.rate), criterionWords(head)].filter(Boolean).join(', ')
}

/** Sample, concentration, direction, rate and criterion of a campaign in one line. Rate in K/min, concentration in g/L. */
export function conditionsOf({ campaign, sample }: Setting): string {
  const { polymerConcentration, solvent, buffer, clouds, rate } = campaign
  const amount = polymerConcentration === null ? '' : `, ${polymerConcentration} g L⁻¹`
  const medium = [solvent, buffer].filter(Boolean).join(', ')
  return [
    sample ? `${sample.name}${amount} in ${medium}` : `sample not stated${amount}, in ${medium}`,
    clouds === 'on-heating' ? 'clouds on heating' : 'clouds on cooling',
    rateWords(rate),
    criterionWords(campaign),
  ].filter(Boolean).join('; ')
}
