import { z } from 'zod'
import { id, instant } from './common'

export const jobParams = z.object({ job: id })
export const jobStates = ['waiting', 'running', 'done', 'failed', 'cancelled'] as const

/** Long work: a row that fills while a worker carries it out. */
export const jobContract = z.object({
  id,
  kind: z.string(),
  state: z.enum(jobStates),
  done: z.number().int(),
  total: z.number().int().nullable(),
  cancelRequested: z.boolean(),
  problem: z.string().nullable(),
  createdAt: instant,
  finishedAt: instant.nullable(),
})
export type Job = z.infer<typeof jobContract>
