import type { Transaction } from '~~/server/database/client'
import { auditEvent } from '~~/server/database/schema'

export const subjects = ['project', 'lab', 'sample', 'stock', 'instrument', 'campaign', 'batch', 'blanks', 'series', 'import', 'job'] as const
export const actions = ['made', 'changed', 'revised', 'imported', 'started', 'discarded'] as const

export interface Event {
  project: string | null
  lab?: string
  action: typeof actions[number]
  subject: typeof subjects[number]
  id: string
  values?: Record<string, string | number | boolean | null>
}

/** Writes down who did what, in the transaction that does it. Holds ids of persons, never their names. */
export async function note(tx: Transaction, who: string, { project, lab, action, subject, id, values = {} }: Event): Promise<void> {
  await tx.insert(auditEvent).values({ person: who, project, lab: lab ?? null, action, subject, subjectId: id, values })
}
