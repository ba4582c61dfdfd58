import { and, eq, sql } from 'drizzle-orm'
import { asPerson, type Transaction } from '~~/server/database/client'
import { projectVisit } from '~~/server/database/schema'

/** Coming back within this time is the same visit: a reload does not make news old. Minutes. */
const oneVisit = 30

/** Notes that the person is looking at the project now; what was new at the start of this visit stays new during it. */
export async function visit(who: string, project: string): Promise<void> {
  await asPerson(who, tx => tx.insert(projectVisit).values({ project, person: who }).onConflictDoUpdate({
    target: [projectVisit.project, projectVisit.person],
    set: {
      before: sql`CASE WHEN now() - ${projectVisit.at} > make_interval(mins => ${oneVisit}) THEN ${projectVisit.at} ELSE ${projectVisit.before} END`,
      at: sql`now()`,
    },
  }))
}

/** The end of the visit before this one; null: there was none. */
export async function lastVisit(tx: Transaction, who: string, project: string): Promise<Date | null> {
  const [found] = await tx.select({
    since: sql<Date | null>`CASE WHEN now() - ${projectVisit.at} > make_interval(mins => ${oneVisit}) THEN ${projectVisit.at} ELSE ${projectVisit.before} END`.mapWith(projectVisit.at),
  }).from(projectVisit).where(and(eq(projectVisit.project, project), eq(projectVisit.person, who)))
  return found?.since ?? null
}
