import { z } from 'zod'
import { id, named } from './common'

export const labRoles = ['lead', 'chemist'] as const
export const projectRoles = ['owner', 'editor', 'collaborator'] as const
export const siteRoles = ['curator', 'admin'] as const

export const signInContract = z.strictObject({
  email: z.email('must be an e-mail address').max(254),
  password: z.string().min(1, 'must not be empty').max(200),
})

export const meContract = z.object({
  person: z.object({ id, name: z.string(), email: z.string(), siteRoles: z.array(z.enum(siteRoles)) }),
  labs: z.array(z.object({ lab: named, role: z.enum(labRoles) })),
  projects: z.array(z.object({ project: named, role: z.enum(projectRoles) })),
})
export type Me = z.infer<typeof meContract>
