import { z } from 'zod'
import { id, instant, named } from './common'
import { projectRoles } from './me'

export const projectParams = z.object({ project: id })

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
