import { z } from 'zod'
import { id, named } from './common'
import { day, later, laterText, number, positive, requiredText, text } from './forms'
import { instrumentContract, sampleContract } from './materials'
import { saltContract } from './series'

export const campaignParams = z.object({ campaign: id })
export const batchParams = z.object({ batch: id })
export const cloudings = ['on-heating', 'on-cooling'] as const
export const criteria = ['onset', 'fraction', 'steepest', 'departure', 'sigmoid'] as const
export const enthalpyBases = ['per-repeat-unit', 'per-cooperative-unit'] as const
export const replicateKinds = ['independent-samples', 'repeat-scans'] as const

/** Left out: not stated here (a copy keeps what it copies); null: left for later. */
const campaignFields = {
  name: requiredText(120),
  clouds: z.enum(cloudings, 'must be chosen').optional(),
  sample: id.nullish(),
  instrument: id.nullish(),
  solvent: requiredText(120).optional(),
  buffer: text(200).nullish().describe('its ions are outside the varied concentration'),
  ph: number.min(-2, 'must be −2 or more').max(16, 'must be at most 16').nullish(),
  polymerConcentration: positive.nullish().describe('g/L'),
  criterion: z.enum(criteria).nullish(),
  criterionFraction: positive.lt(1, 'must be below 1').nullish().describe('fraction of the transmittance, with criterion "fraction"'),
  rate: positive.nullish().describe('K/min'),
  hold: number.min(0, 'must be 0 or more').nullish().describe('min held before a ramp'),
  replicateKind: z.enum(replicateKinds).nullish().describe('what a replicate is'),
  transitionEnthalpy: number.nullish().describe('kJ/mol'),
  transitionEnthalpyBasis: z.enum(enthalpyBases).nullish(),
  startedOn: day.nullish(),
} as const

/** `copyFrom` takes every condition that is not given from another campaign one may see. */
export const newCampaignContract = z.strictObject({
  ...campaignFields,
  lab: id.optional().describe('default: the only lab of the person in the project'),
  copyFrom: id.optional(),
})
/** The whole form again; what is left out is not stated any more. */
export const changeCampaignContract = z.strictObject(campaignFields)
export type CampaignForm = z.infer<typeof changeCampaignContract>

export const batchContract = z.object({
  id, label: z.string(), measuredOn: z.iso.date().nullable(), referenceCheck: z.number().nullable(), note: z.string().nullable(),
  revision: z.number().int().nullable().describe('of its blanks'), blanks: z.number().int(), series: z.number().int(),
})
export const newBatchContract = z.strictObject({
  label: requiredText(80),
  measuredOn: later(day),
  referenceCheck: later(number).describe('cloud point of the agreed reference sample in this run, °C'),
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
