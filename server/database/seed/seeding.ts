import { eq } from 'drizzle-orm'
import type { Transaction } from '../client'
import { person, project } from '../schema'

/** Data planted once: its name marks the database, so a second run does nothing. */
export interface Seed {
  name: string
  plant: (tx: Transaction) => Promise<void>
}

/** The id of a demo account, for seeds that come after the accounts. */
export async function personByEmail(tx: Transaction, email: string): Promise<string> {
  const [found] = await tx.select({ id: person.id }).from(person).where(eq(person.email, email))
  if (!found) throw new Error(`the seed of accounts has no ${email}`)
  return found.id
}

/** The id of the demo project. */
export async function projectByName(tx: Transaction, name: string): Promise<string> {
  const [found] = await tx.select({ id: project.id }).from(project).where(eq(project.name, name))
  if (!found) throw new Error(`the seed of accounts has no project ${name}`)
  return found.id
}
