import type { Cautions } from '#shared/science/chemistry/cautions'
import { plainFormula } from '#shared/science/chemistry/ions'

export const lastWord = 'The safety data sheet of the product in hand, your local rules and the practice your lab is licensed for have the last word.'

/** What stands before the cautions themselves: whose record this is, or that there is none. */
export function cautionOpening(formula: string, cautions: Cautions | null): string {
  const salt = plainFormula(formula)
  if (!cautions) return `No caution for ${salt} is on record here. That does not make it harmless.`
  if (!cautions.isOwn) return `No caution for ${salt} itself is on record here; this is what is on record for ${cautions.of.map(plainFormula).join(' and ')}.`
  return cautions.isUnclassified ? `${salt} is not usually classified as hazardous.` : ''
}

/** How far to trust the record. */
export function cautionConfidence({ confidence }: Cautions): string {
  const seen = confidence === 'read in a source' ? 'read in a source' : 'entered from memory'
  return `Typical classification for orientation, ${seen}; suppliers differ.`
}
