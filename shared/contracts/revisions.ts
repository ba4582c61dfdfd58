import { z } from 'zod'
import { id, instant } from './common'
import { fitResultContract } from './fit'
import { requiredText, text } from './forms'
import { changeReasons, directions, fitChoiceContract, readingContract, readingLimits, revisionContract } from './series'

const concentration = z.number('must be a number').min(0, 'must be 0 or more')
const cloudPoint = z.number('must be a number').min(-20, 'must be −20 °C or more').max(150, 'must be at most 150 °C')
const values = {
  x: concentration.describe('mol/L or mol/kg, as the series counts'),
  y: cloudPoint.describe('°C'),
  sd: z.number('must be a number').min(0, 'must be 0 or more').nullable().describe('standard uncertainty of y, K'),
  n: z.number('must be a number').int('must be a whole number').min(1, 'must be 1 or more').nullable().describe('independent samples'),
  note: text(500).nullable(),
} as const

/** One thing done to the readings of a series or to the blanks of a batch. */
export const changeContract = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('correct'),
    reading: id,
    to: z.strictObject(values).partial().describe('what changes; the rest stays'),
    reason: z.enum(changeReasons),
    words: text(500).optional().describe('asked for with the reason "other"'),
  }),
  z.strictObject({ kind: z.literal('set-aside'), reading: id, reason: requiredText(500) }),
  z.strictObject({ kind: z.literal('put-back'), reading: id }),
  z.strictObject({
    kind: z.literal('add'), ...values, sd: values.sd.default(null), n: values.n.default(null), note: values.note.default(null),
    batch: id.nullable().default(null), direction: z.enum(directions).optional().describe('default: as the campaign clouds'), limit: z.enum(readingLimits).default('exact'),
  }),
])
export type Change = z.infer<typeof changeContract>

const from = z.number().int().min(1).nullable().describe('the revision that was changed; null where there was none')

/** Makes the next revision. Changes to blanks go to their batches and are kept in the same act. */
export const newRevisionContract = z.strictObject({
  from,
  changes: z.array(changeContract).max(5_000).default([]),
  choice: fitChoiceContract.optional().describe('how to fit from now on; left out: as before'),
  batches: z.array(z.strictObject({ batch: id, from, changes: z.array(changeContract).min(1).max(500) })).max(50).default([]),
  summary: text(200).optional().describe('left out: made from the changes'),
})
export type NewRevision = z.infer<typeof newRevisionContract>

export const newBlanksContract = z.strictObject({ from, changes: z.array(changeContract).min(1).max(500) })

/** The blanks of a batch, shared by its series. */
export const blanksContract = z.object({
  id, label: z.string(), measuredOn: z.iso.date().nullable(), blanks: z.array(readingContract), revisions: z.array(revisionContract),
})
export type Blanks = z.infer<typeof blanksContract>

/** One revision with what it held and how it was fitted, as two of them are compared. */
export const seriesStateContract = z.object({
  number: z.number().int(), summary: z.string(), by: z.string(), at: instant,
  choice: fitChoiceContract.nullable(),
  readings: z.array(readingContract),
  fit: fitResultContract.extend({ id }).nullable(),
})
export type SeriesState = z.infer<typeof seriesStateContract>
export const revisionParams = z.object({ series: id, revision: z.coerce.number().int().min(1) })

/** What is typed and not yet kept: any JSON the page can restore itself from. */
export const draftContract = z.object({ from: z.number().int().nullable(), content: z.unknown().describe('any JSON the page can restore itself from'), updatedAt: instant })
export const keepDraftContract = z.strictObject({ from: z.number().int().nullable(), content: z.unknown().describe('any JSON the page can restore itself from') })
export type Draft = z.infer<typeof draftContract>
export const draftAnswerContract = z.object({ draft: draftContract.nullable() })

export const exportFormats = ['csv', 'xlsx', 'md', 'tex'] as const
export const exportContents = ['readings', 'constants'] as const
export const exportQuery = z.object({
  format: z.enum(exportFormats).default('csv'),
  of: z.enum(exportContents).default('readings').describe('md and tex give constants'),
})

export const seriesStockContract = z.strictObject({ stock: id.nullable() })
