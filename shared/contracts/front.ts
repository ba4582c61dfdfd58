import { z } from 'zod'
import { id, instant, named } from './common'
import { importSummaryContract } from './imports'
import { saltContract } from './series'

const value = z.union([z.string(), z.number(), z.boolean(), z.null()])
const place = z.object({ id, name: z.string(), lab: named })

/** Something that somebody did in the project. The sentence is the client's. */
export const projectChangeContract = z.object({
  id, at: instant, by: z.string(),
  action: z.enum(['made', 'changed', 'revised', 'imported', 'started', 'discarded']),
  subject: z.enum(['project', 'lab', 'sample', 'stock', 'instrument', 'campaign', 'batch', 'blanks', 'series', 'import', 'job']),
  series: z.object({ id, salt: saltContract }).nullable().describe('the series it is about'),
  campaign: place.nullable().describe('the campaign it is about'),
  values: z.record(z.string(), value),
})
export type ProjectChange = z.infer<typeof projectChangeContract>

const constant = z.object({ estimate: z.number(), standardError: z.number().nullable() })

/** What a project's front page tells: what changed since the last visit, its campaigns, what waits, what moved. */
export const projectFrontContract = z.object({
  since: instant.nullable().describe('the visit before this one; null: the first'),
  changes: z.array(projectChangeContract).describe('by others since then, newest first; on a first visit the newest by anybody'),
  campaigns: z.array(place.extend({
    conditions: z.string().describe('rate and criterion, short'),
    missing: z.array(z.string()).describe('what a good report states and this campaign does not yet, in words'),
    batchesWithoutBlanks: z.array(z.string()),
  })),
  waits: z.object({
    imports: z.array(importSummaryContract).describe('of the person, not yet committed'),
    drafts: z.array(z.object({ series: id, salt: saltContract, campaign: place, at: instant })).describe('typed by the person and not kept'),
  }),
  moved: z.array(z.object({
    series: id, salt: saltContract, campaign: place, name: z.string(), unit: z.string(), before: constant, now: constant,
  })).describe('leading constants that are others than at the last visit'),
})
export type ProjectFront = z.infer<typeof projectFrontContract>
