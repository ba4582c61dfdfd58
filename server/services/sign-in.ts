import { createHash } from 'node:crypto'
import { and, eq, inArray, isNull, sql } from 'drizzle-orm'
import { asSystem, type Transaction } from '~~/server/database/client'
import { auditEvent, credential, person, signInAttempt } from '~~/server/database/schema'
import { ServiceError } from './errors'
import { openSession, sessionPerson, type Visitor } from './sessions'

/** Misses that cost nothing; from then on each doubles the wait. */
const freeMisses = 5
const firstWait = 15
const longestWait = 900
/** A miss is forgotten after this many seconds without another. */
const memory = 3_600

/** How a password is checked against its hash; the hash of nobody takes the same time. */
export interface PasswordCheck {
  verify: (hash: string, password: string) => Promise<boolean>
  hashOfNobody: () => Promise<string>
}

/**
 * Opens a session for the right password. An unknown address and a wrong password get the same answer in the same time.
 *
 * @throws ServiceError 'wrong-credentials', or 'too-many' while the account or the network address has to wait
 */
export async function signIn(email: string, password: string, address: string, check: PasswordCheck): Promise<{ visitor: Visitor, session: string }> {
  const keys = { account: keyOf('account', email.trim().toLowerCase()), address: keyOf('address', address) }
  // The miss is counted before the password is looked at, so that many tries at once gain nothing.
  await asSystem('sign-in', tx => countMiss(tx, [keys.account, keys.address]))
  const found = await asSystem('sign-in', tx => findCredential(tx, email.trim()))
  const right = await check.verify(found?.passwordHash ?? await check.hashOfNobody(), password)
  if (!found || !right) throw new ServiceError('wrong-credentials', 'E-mail address and password do not belong together. Check both and try again.')
  const session = await asSystem('sign-in', async (tx) => {
    await takeBack(tx, keys)
    await tx.insert(auditEvent).values({ person: found.person, action: 'signed-in', subject: 'person', subjectId: found.person, values: {} })
    return openSession(tx, found.person)
  })
  const visitor = await sessionPerson(session)
  if (!visitor) throw new ServiceError('wrong-credentials', 'This account is no longer active. Ask an administrator.')
  return { visitor, session }
}

async function findCredential(tx: Transaction, email: string) {
  const [found] = await tx.select({ person: person.id, passwordHash: credential.passwordHash })
    .from(person).innerJoin(credential, eq(credential.person, person.id))
    .where(and(eq(sql`lower(${person.email})`, email.toLowerCase()), isNull(person.deactivatedAt)))
  return found
}

/** Seconds to wait after this many misses in a row. */
export function waitAfter(misses: number): number {
  return misses < freeMisses ? 0 : Math.min(longestWait, firstWait * 2 ** (misses - freeMisses))
}

async function countMiss(tx: Transaction, keys: string[]) {
  const sorted = [...keys].sort()
  // Rows are made and locked in one order, so that two tries at once queue up instead of passing each other.
  for (const key of sorted) await tx.insert(signInAttempt).values({ key, misses: 0, lastAt: new Date() }).onConflictDoNothing()
  const attempts = await tx.select().from(signInAttempt).where(inArray(signInAttempt.key, sorted)).orderBy(signInAttempt.key).for('update')
  const now = Date.now()
  const wait = Math.max(0, ...attempts.map(({ blockedUntil }) => (blockedUntil?.getTime() ?? 0) - now)) / 1000
  if (wait > 0) {
    throw new ServiceError('too-many', `Too many sign-ins went wrong. Wait ${Math.ceil(wait)} seconds, then try again.`, { retryAfter: wait })
  }
  for (const { key, misses, lastAt } of attempts) {
    const count = (now - lastAt.getTime() > memory * 1000 ? 0 : misses) + 1
    const seconds = waitAfter(count)
    await tx.update(signInAttempt)
      .set({ misses: count, lastAt: new Date(now), blockedUntil: seconds > 0 ? new Date(now + seconds * 1000) : null })
      .where(eq(signInAttempt.key, key))
  }
}

// The account starts afresh; the address only gets this try back, else one known account would buy endless guesses.
async function takeBack(tx: Transaction, keys: { account: string, address: string }) {
  await tx.delete(signInAttempt).where(eq(signInAttempt.key, keys.account))
  await tx.update(signInAttempt)
    .set({ misses: sql`greatest(${signInAttempt.misses} - 1, 0)`, blockedUntil: null })
    .where(eq(signInAttempt.key, keys.address))
}

function keyOf(kind: 'account' | 'address', value: string): string {
  return `${kind}:${createHash('sha256').update(value).digest('hex')}`
}
