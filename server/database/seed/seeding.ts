import { eq, inArray } from 'drizzle-orm'
import type { Transaction } from '../client'
import { person, project } from '../schema'

/** Data planted once: its name marks the database, so a second run does nothing. */
export interface Seed {
  name: string
  plant: (tx: Transaction) => Promise<void>
}

/** The ids of demo accounts by their addresses, for seeds that come after the accounts. */
export async function peopleByEmail(tx: Transaction, emails: string[]): Promise<Map<string, string>> {
  const found = await tx.select({ id: person.id, email: person.email }).from(person).where(inArray(person.email, emails))
  const missing = emails.filter(email => !found.some(one => one.email === email))
  if (missing.length > 0) throw new Error(`the seed of accounts has no ${missing.join(', ')}`)
  return new Map(found.map(one => [one.email, one.id]))
}

/** The id of the demo project. */
export async function projectByName(tx: Transaction, name: string): Promise<string> {
  const [found] = await tx.select({ id: project.id }).from(project).where(eq(project.name, name))
  if (!found) throw new Error(`the seed of accounts has no project ${name}`)
  return found.id
}
