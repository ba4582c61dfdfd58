import { and, eq, gt, isNull } from 'drizzle-orm'
import { v7 } from 'uuid'
import { asSystem, type Transaction } from '~~/server/database/client'
import { person, personSiteRole, session } from '~~/server/database/schema'

/** A signed-in person. */
export interface Visitor {
  id: string
  name: string
  email: string
  siteRoles: (typeof personSiteRole.$inferSelect.role)[]
}

export const sessionDays = 14

/** Opens a session and gives its id. */
export async function openSession(tx: Transaction, person: string): Promise<string> {
  const id = v7()
  await tx.insert(session).values({ id, person, expiresAt: new Date(Date.now() + sessionDays * 86_400_000) })
  return id
}

/** The person behind a session that is neither revoked nor expired. */
export function sessionPerson(id: string): Promise<Visitor | null> {
  return asSystem('session', async (tx) => {
    const rows = await tx
      .select({ id: person.id, name: person.name, email: person.email, role: personSiteRole.role })
      .from(session)
      .innerJoin(person, eq(person.id, session.person))
      .leftJoin(personSiteRole, eq(personSiteRole.person, person.id))
      .where(and(eq(session.id, id), isNull(session.revokedAt), gt(session.expiresAt, new Date()), isNull(person.deactivatedAt)))
    const [first] = rows
    if (!first) return null
    return { id: first.id, name: first.name, email: first.email, siteRoles: rows.flatMap(row => row.role ?? []) }
  })
}

/** Ends a session everywhere its cookie went. */
export async function revokeSession(id: string): Promise<void> {
  await asSystem('session', tx => tx.update(session).set({ revokedAt: new Date() }).where(and(eq(session.id, id), isNull(session.revokedAt))))
}
