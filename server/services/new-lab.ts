import { eq, sql } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { Transaction } from '~~/server/database/client'
import { membership } from '~~/server/database/schema'
import { note } from './audit'
import { ServiceError } from './errors'

const uniqueViolation = '23505'

const isTaken = (error: unknown) => error instanceof Error && error.cause instanceof Error && 'code' in error.cause && error.cause.code === uniqueViolation

/** Begins a lab in the name of somebody who is in none; who is in one works there. */
export async function beginLab(tx: Transaction, who: string, name: string): Promise<void> {
  const [own] = await tx.select({ lab: membership.lab }).from(membership).where(eq(membership.person, who)).limit(1)
  if (own) throw new ServiceError('invalid', 'You are in a lab already.', { faults: [{ path: 'lab', message: 'must be left out: you are in a lab already' }] })
  const id = v7()
  try {
    await tx.execute(sql`SELECT guard.begin_lab(${id}, ${name})`)
  }
  catch (error) {
    if (!isTaken(error)) throw error
    throw new ServiceError('conflict', `There is a lab “${name}” already. If it is yours, ask its lead to bring you in; otherwise choose another name.`, { faults: [{ path: 'lab', message: 'is taken' }] })
  }
  await note(tx, who, { project: null, lab: id, action: 'made', subject: 'lab', id, values: { name } })
}
