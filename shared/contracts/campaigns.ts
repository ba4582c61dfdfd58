import { z } from 'zod'
import { id, named } from './common'
import { day, later, laterText, positive, requiredText } from './forms'
import { instrumentContract, sampleContract } from './materials'
import { saltContract } from './series'

export const campaignParams = z.object({ campaign: id })
export const batchParams = z.object({ batch: id })
export const cloudings = ['on-heating', 'on-cooling'] as const
export const criteria = ['onset', 'fraction', 'steepest', 'departure', 'sigmoid'] as const
export const enthalpyBases = ['per-repeat-unit', 'per-cooperative-unit'] as const
export const replicateKinds = ['independent-samples', 'repeat-scans'] as const

const campaignFields = {
  name: requiredText(120),
  lab: id.optional().describe('default: the only lab of the person in the project'),
  clouds: z.enum(cloudings).default('on-heating'),
  sample: later(id),
  instrument: later(id),
  solvent: requiredText(120).default('water'),
  buffer: laterText(200).describe('its ions are outside the varied concentration'),
  ph: later(z.number().min(-2, 'must be −2 or more').max(16, 'must be at most 16')),
  polymerConcentration: later(positive).describe('g/L'),
  criterion: later(z.enum(criteria)),
  criterionFraction: later(positive.lt(1, 'must be below 1')).describe('fraction of the transmittance, with criterion "fraction"'),
  rate: later(positive).describe('K/min'),
  hold: later(z.number().min(0, 'must be 0 or more')).describe('min held before a ramp'),
  replicateKind: later(z.enum(replicateKinds)).describe('what a replicate is'),
  transitionEnthalpy: later(z.number()).describe('kJ/mol'),
  transitionEnthalpyBasis: later(z.enum(enthalpyBases)),
  startedOn: later(day),
} as const

/** `copyFrom` takes every condition that is not given from another campaign one may see. */
export const newCampaignContract = z.strictObject({ ...campaignFields, copyFrom: id.optional() })
/** The whole form again; what is left out is left for later. */
export const changeCampaignContract = z.strictObject(campaignFields).omit({ lab: true })

export const batchContract = z.object({
  id, label: z.string(), measuredOn: z.iso.date().nullable(), referenceCheck: z.number().nullable(), note: z.string().nullable(),
  revision: z.number().int().nullable().describe('of its blanks'), blanks: z.number().int(), series: z.number().int(),
})
export const newBatchContract = z.strictObject({
  label: requiredText(80),
  measuredOn: later(day),
  referenceCheck: later(z.number()).describe('cloud point of the agreed reference sample in this run, °C'),
  note: laterText(500),
})

export const campaignContract = z.object({
  id, name: z.string(), project: named, lab: named, clouds: z.enum(cloudings), sample: sampleContract.nullable(), instrument: instrumentContract.nullable(),
  solvent: z.string(), buffer: z.string().nullable(), ph: z.number().nullable(), polymerConcentration: z.number().nullable(), criterion: z.enum(criteria).nullable(), criterionFraction: z.number().nullable(),
  rate: z.number().nullable(), hold: z.number().nullable(), replicateKind: z.enum(replicateKinds).nullable(),
  transitionEnthalpy: z.number().nullable(), transitionEnthalpyBasis: z.enum(enthalpyBases).nullable(), startedOn: z.iso.date().nullable(),
  conditions: z.string(), missing: z.array(z.string()).describe('what a good report states and this campaign does not yet, in words'),
  batches: z.array(batchContract),
  series: z.array(z.object({ id, salt: saltContract, readings: z.number().int(), isFitted: z.boolean() })),
})
export type Campaign = z.infer<typeof campaignContract>
