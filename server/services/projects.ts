import { and, asc, eq, gt, isNull } from 'drizzle-orm'
import { v7 } from 'uuid'
import type { z } from 'zod'
import type { changeProjectContract, newProjectContract, Project, ProjectDetail } from '#shared/contracts/projects'
import { asPerson, type Transaction } from '~~/server/database/client'
import { campaign, lab, membership, person, project, projectLab, projectMember } from '~~/server/database/schema'
import { note } from './audit'
import { beginLab } from './new-lab'
import { cursorOf, pageOf, type Page } from './pages'

export type ProjectRole = typeof projectMember.$inferSelect.role

const editing: readonly ProjectRole[] = ['owner', 'editor']

export const mayEdit = (role: ProjectRole | null): boolean => role !== null && editing.includes(role)

/** What a person is in a project; null where there is nothing to see. */
export async function roleIn(tx: Transaction, who: string, id: string): Promise<ProjectRole | null> {
  const [found] = await tx.select({ role: projectMember.role }).from(projectMember)
    .innerJoin(project, eq(project.id, projectMember.project))
    .where(and(eq(projectMember.project, id), eq(projectMember.person, who), isNull(project.deletedAt)))
  return found?.role ?? null
}

export const projectRight = (who: string, id: string) => asPerson(who, tx => roleIn(tx, who, id))

const fields = {
  id: project.id, name: project.name, question: project.question, invented: project.invented,
  role: projectMember.role, createdAt: project.createdAt,
}
const written = <Row extends { createdAt: Date }>(row: Row) => ({ ...row, createdAt: row.createdAt.toISOString() })

/** The projects a person is a member of, oldest first. */
export function listProjects(who: string, page: Page) {
  return asPerson(who, async (tx) => {
    const rows = await tx.select(fields).from(project)
      .innerJoin(projectMember, and(eq(projectMember.project, project.id), eq(projectMember.person, who)))
      .where(and(isNull(project.deletedAt), page.cursor ? gt(project.id, cursorOf(page.cursor)) : undefined))
      .orderBy(asc(project.id)).limit(page.limit + 1)
    return pageOf<Project>(rows.map(written), page.limit)
  })
}

/** Makes a project that the person owns; their labs take part in it, or the lab that is begun with it. */
export function makeProject(who: string, { name, question, lab: newLab }: z.infer<typeof newProjectContract>): Promise<Project> {
  return asPerson(who, async (tx) => {
    const made = { id: v7(), name, question: question ?? null, createdBy: who, createdAt: new Date() }
    if (newLab) await beginLab(tx, who, newLab)
    await tx.insert(project).values(made)
    const labs = await tx.selectDistinct({ lab: membership.lab }).from(membership).where(eq(membership.person, who))
    if (labs.length > 0) await tx.insert(projectLab).values(labs.map(({ lab }) => ({ project: made.id, lab })))
    await note(tx, who, { project: made.id, action: 'made', subject: 'project', id: made.id })
    return readProject(tx, who, made.id)
  })
}

/** Changes name and question. */
export function changeProject(who: string, id: string, { name, question }: z.infer<typeof changeProjectContract>): Promise<Project> {
  return asPerson(who, async (tx) => {
    await tx.update(project).set({ name, question: question ?? null }).where(eq(project.id, id))
    await note(tx, who, { project: id, action: 'changed', subject: 'project', id, values: { name } })
    return readProject(tx, who, id)
  })
}

async function readProject(tx: Transaction, who: string, id: string): Promise<Project> {
  const [row] = await tx.select(fields).from(project)
    .innerJoin(projectMember, and(eq(projectMember.project, project.id), eq(projectMember.person, who)))
    .where(eq(project.id, id))
  return written(row!)
}

/** One project with its labs, campaigns and members. */
export function showProject(who: string, id: string): Promise<ProjectDetail> {
  return asPerson(who, async (tx) => {
    const head = await readProject(tx, who, id)
    const labs = await tx.select({ id: lab.id, name: lab.name }).from(projectLab)
      .innerJoin(lab, eq(lab.id, projectLab.lab)).where(eq(projectLab.project, id)).orderBy(asc(lab.name))
    const campaigns = await tx.select({ id: campaign.id, name: campaign.name, clouds: campaign.clouds, lab: { id: lab.id, name: lab.name } })
      .from(campaign).innerJoin(lab, eq(lab.id, campaign.lab))
      .where(and(eq(campaign.project, id), isNull(campaign.deletedAt))).orderBy(asc(lab.name), asc(campaign.id))
    const members = await tx.select({ role: projectMember.role, person: { id: person.id, name: person.name } })
      .from(projectMember).innerJoin(person, eq(person.id, projectMember.person))
      .where(eq(projectMember.project, id)).orderBy(asc(projectMember.role), asc(person.name))
    return { ...head, labs, campaigns, members }
  })
}
