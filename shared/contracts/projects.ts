import { z } from 'zod'
import { id, instant, named } from './common'
import { projectRoles } from './me'

export const projectParams = z.object({ project: id })

const projectFields = {
  name: z.string().trim().min(1, 'must not be empty').max(120, 'must have at most 120 characters'),
  question: z.string().trim().max(1_000, 'must have at most 1000 characters').nullish().describe('what the project wants to know'),
} as const

export const changeProjectContract = z.strictObject(projectFields)
export const newProjectContract = z.strictObject({
  ...projectFields,
  lab: z.string().trim().min(1, 'must not be empty').max(120, 'must have at most 120 characters').optional().describe('name of the lab to make, for a person who is in none'),
})

export const projectContract = z.object({
  id,
  name: z.string(),
  question: z.string().nullable().describe('what the project wants to know'),
  invented: z.boolean().describe('true: demonstration data'),
  role: z.enum(projectRoles),
  createdAt: instant,
})
export type Project = z.infer<typeof projectContract>

export const projectDetailContract = projectContract.extend({
  labs: z.array(named),
  campaigns: z.array(z.object({ id, name: z.string(), lab: named, clouds: z.enum(['on-heating', 'on-cooling']) })),
  members: z.array(z.object({ person: named, role: z.enum(projectRoles) })),
})
export type ProjectDetail = z.infer<typeof projectDetailContract>
