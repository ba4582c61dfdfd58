import { z } from 'zod'

/** RFC 9457 problem details, with every problem of the input at once. */
export const problemContract = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  reference: z.string().optional().describe('number to quote when the fault is ours'),
  current: z.unknown().optional().describe('with 409: the newer state, as the address gives it'),
  errors: z.array(z.object({ path: z.string(), row: z.number().int().optional(), message: z.string() })),
})
export type Problem = z.infer<typeof problemContract>
