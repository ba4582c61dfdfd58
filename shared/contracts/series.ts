import { z } from 'zod'
import { id, instant, named } from './common'
import { modelNames } from '#shared/science/fitting/types'
import { derivedContract, fitRequestContract, fitResultContract, fittedParameterContract, noteContract } from './fit'

export const seriesParams = z.object({ series: id })
export const readingLimits = ['exact', 'below', 'above', 'salt-precipitated'] as const

export const saltContract = z.object({
  formula: z.string().describe('plain text, such as Na2SO4'),
  name: z.string(),
  anion: z.string().describe('such as SO4^2-'),
  cation: z.string().describe('such as Na^+'),
})

export const campaignSummaryContract = z.object({
  id,
  name: z.string(),
  lab: named,
  clouds: z.enum(['on-heating', 'on-cooling']),
})

/** A reading as small multiples need it. */
export const readingPointContract = z.object({
  id: id.describe('the same blank carries the same id in every series of its batch'),
  x: z.number().describe('concentration, mol/L'),
  y: z.number().describe('cloud point, °C'),
  limit: z.enum(readingLimits),
  setAside: z.boolean(),
  blank: z.boolean().describe('belongs to the batch and is shared by its series'),
})

/** What the salt was weighed into, when it is on record. */
export const stockSummaryContract = z.object({
  id,
  lot: z.string().nullable(),
  madeOn: z.iso.date().nullable(),
  ageAtUse: z.number().nullable().describe('months from making the stock to the first reading of the series'),
})

/** One series of a project with its current fit, without residuals and covariance. */
export const seriesSummaryContract = z.object({
  id,
  salt: saltContract,
  campaign: campaignSummaryContract,
  stock: stockSummaryContract.nullable(),
  revision: z.number().int().nullable().describe('null: nothing measured yet'),
  readings: z.array(readingPointContract),
  fit: z.object({
    id,
    model: fitResultContract.shape.model,
    residualStandardDeviation: z.number().nullable(),
    parameters: z.array(fittedParameterContract),
    covariance: z.array(z.array(z.number())).nullable(),
    derived: z.array(derivedContract),
    notes: z.array(noteContract),
  }).nullable(),
})
export type SeriesSummary = z.infer<typeof seriesSummaryContract>

export const changeReasons = ['typing-error', 're-measured', 'other'] as const
export const directions = ['heating', 'cooling'] as const

export const readingContract = z.object({
  id,
  number: z.number().int().describe('place in the table, from 1'),
  x: z.number().describe('concentration, mol/L'),
  y: z.number().describe('cloud point, °C'),
  sd: z.number().nullable().describe('standard uncertainty of y, K'),
  n: z.number().int().nullable().describe('independent samples'),
  batch: z.object({ id, label: z.string() }).nullable(),
  direction: z.enum(directions),
  limit: z.enum(readingLimits),
  blank: z.boolean(),
  note: z.string().nullable(),
  setAside: z.object({ reason: z.string(), by: z.string(), at: instant }).nullable(),
  entersFit: z.boolean().describe('exact, not set aside, and measured in the direction in which the campaign clouds'),
  changed: z.object({
    x: z.number(), y: z.number(), sd: z.number().nullable(), n: z.number().int().nullable(),
    reason: z.enum(changeReasons), words: z.string().nullable(),
  }).nullable().describe('the values before the last correction, and why it was made'),
  origin: z.string().describe('where the value comes from, in words: typed, or file and row'),
})

export const revisionContract = z.object({
  number: z.number().int(),
  summary: z.string(),
  by: z.string(),
  at: instant,
})

/** How well one model stands beside the others on the same readings. */
export const supportContract = z.object({
  model: fitResultContract.shape.model,
  residualStandardDeviation: z.number().nullable(),
  aicc: z.number().nullable(),
  deltaAicc: z.number().nullable().describe('AICc above the best model'),
})

export const fitChoiceContract = z.strictObject({
  model: z.enum(modelNames).nullable().describe('null: the form that the readings support'),
  options: fitRequestContract.pick({ parameters: true, weighting: true, sdMeaning: true, confidence: true, intervals: true }),
}).refine(({ model, options }) => model !== null || !options.parameters, { path: ['options', 'parameters'], message: 'need a model to be parameters of' })
export type FitChoice = z.infer<typeof fitChoiceContract>

export const seriesContract = z.object({
  id,
  project: named,
  salt: saltContract,
  campaign: campaignSummaryContract.extend({
    conditions: z.string().describe('sample, concentration, direction and rate in a sentence'),
  }),
  stock: stockSummaryContract.nullable(),
  canEdit: z.boolean(),
  revision: z.number().int().nullable(),
  choice: fitChoiceContract.nullable().describe('how this revision asks to be fitted; null: the form its readings support'),
  batches: z.array(z.object({
    id, label: z.string(), measuredOn: z.iso.date().nullable(), revision: z.number().int().nullable().describe('of the blanks'), series: z.number().int().describe('how many series of the batch lean on its blanks'),
  })),
  readings: z.array(readingContract),
  fit: fitResultContract.extend({ id }).nullable(),
  support: z.object({
    verdict: z.enum(['supported', 'undecided', 'no-evidence']).nullable(),
    models: z.array(supportContract),
  }),
  revisions: z.array(revisionContract),
})
export type Series = z.infer<typeof seriesContract>
