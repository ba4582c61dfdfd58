import { Hash } from '@adonisjs/hash'
import { Scrypt } from '@adonisjs/hash/drivers/scrypt'
import { v7 } from 'uuid'
import type { Transaction } from '../client'
import { credential, lab, membership, person, personSiteRole, project, projectLab, projectMember } from '../schema'
import type { Seed } from './seeding'

/** Printed on the start screen: these accounts exist in the demo only. */
const password = 'anionary-demo'

interface Account {
  email: string
  name: string
  lab?: string
  labRoles?: (typeof membership.$inferInsert.role)[]
  siteRole?: typeof personSiteRole.$inferInsert.role
  projectRole?: typeof projectMember.$inferInsert.role
}

const labs = ['Norrvik', 'Ostrel', 'Quaymere'] as const

/** Invented people; `.example` addresses reach nobody. */
const people: Account[] = [
  { email: 'ines@norrvik.example', name: 'Ines Tamsel', lab: 'Norrvik', labRoles: ['lead'], projectRole: 'owner' },
  { email: 'tomas@norrvik.example', name: 'Tomas Okvist', lab: 'Norrvik', labRoles: ['chemist'], projectRole: 'editor' },
  { email: 'wren@ostrel.example', name: 'Wren Hallam', lab: 'Ostrel', labRoles: ['lead', 'chemist'], projectRole: 'editor' },
  { email: 'odile@quaymere.example', name: 'Odile Varne', lab: 'Quaymere', labRoles: ['chemist'], projectRole: 'editor' },
  { email: 'piet@elsewhere.example', name: 'Piet Roske', projectRole: 'collaborator' },
  { email: 'sana@shelf.example', name: 'Sana Mirelle', siteRole: 'curator' },
  { email: 'admin@anionary.example', name: 'Administrator', siteRole: 'admin' },
]

/** The three invented labs, their people, and the project they share. */
export const accounts: Seed = {
  name: 'accounts',
  async plant(tx) {
    const labIds = new Map(labs.map(name => [name as string, v7()]))
    await tx.insert(lab).values([...labIds].map(([name, id]) => ({ id, name })))
    const made = await plantPeople(tx, labIds)

    const shared = { id: v7(), name: 'Shadehouse gel', question: 'Three labs tune the clouding temperature of a greenhouse-shading gel with ten sodium salts. Wanted: 27 °C.', invented: true }
    const owner = made.find(one => one.projectRole === 'owner')!
    await tx.insert(project).values({ ...shared, createdBy: owner.id })
    await tx.insert(projectLab).values([...labIds.values()].map(id => ({ project: shared.id, lab: id })))
    // The owner is already a member: the database sees to that when a project is made.
    await tx.insert(projectMember).values(made.flatMap(({ id, projectRole }) =>
      projectRole && projectRole !== 'owner' ? [{ project: shared.id, person: id, role: projectRole }] : []))
  },
}

async function plantPeople(tx: Transaction, labIds: ReadonlyMap<string, string>) {
  const hash = new Hash(new Scrypt({}))
  const made = people.map(account => ({ ...account, id: v7() }))
  await tx.insert(person).values(made.map(({ id, name, email }) => ({ id, name, email })))
  await tx.insert(credential).values(await Promise.all(made.map(async ({ id }) => ({ person: id, passwordHash: await hash.make(password) }))))
  await tx.insert(membership).values(made.flatMap(({ id, lab, labRoles }) =>
    (labRoles ?? []).map(role => ({ person: id, lab: labIds.get(lab!)!, role }))))
  await tx.insert(personSiteRole).values(made.flatMap(({ id, siteRole }) => siteRole ? [{ person: id, role: siteRole }] : []))
  return made
}
