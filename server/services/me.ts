import { and, asc, eq, isNull } from 'drizzle-orm'
import type { Me } from '#shared/contracts/me'
import { asPerson } from '~~/server/database/client'
import { lab, membership, project, projectMember } from '~~/server/database/schema'
import type { Visitor } from './sessions'

/** Who a person is here: labs, projects, and what they are in each. */
export function describeMe(visitor: Visitor): Promise<Me> {
  return asPerson(visitor.id, async (tx) => {
    const labs = await tx.select({ lab: { id: lab.id, name: lab.name }, role: membership.role })
      .from(membership).innerJoin(lab, eq(lab.id, membership.lab))
      .where(eq(membership.person, visitor.id)).orderBy(asc(lab.name), asc(membership.role))
    const projects = await tx.select({ project: { id: project.id, name: project.name }, role: projectMember.role })
      .from(projectMember).innerJoin(project, eq(project.id, projectMember.project))
      .where(and(eq(projectMember.person, visitor.id), isNull(project.deletedAt))).orderBy(asc(project.id))
    return { person: visitor, labs, projects }
  })
}
