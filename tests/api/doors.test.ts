import { sql } from 'drizzle-orm'
import { afterAll, describe, expect, it } from 'vitest'
import { v7 } from 'uuid'
import { asPerson, asReviewLink, asSystem, closeDatabase, type Transaction } from '~~/server/database/client'
import { campaign, credential, project, reading, session } from '~~/server/database/schema'
import { personId } from './support/database'
import { people } from './support/server'

const count = async (tx: Transaction, table: typeof project | typeof campaign | typeof reading | typeof session | typeof credential) => tx.$count(table)
const whoAsks = async (tx: Transaction) => (await tx.execute(sql`select
  current_setting('anionary.person', true) as person, current_setting('anionary.system', true) as system, current_setting('anionary.record', true) as record`)).rows[0]

afterAll(closeDatabase)

describe('the door for persons', () => {
  it('shows a member the project', async () => {
    expect(await asPerson(await personId(people.collaborator), tx => count(tx, reading))).toBeGreaterThan(800)
  })

  it('forgets who asked when the transaction ends, on every connection', async () => {
    const member = await personId(people.member)
    await Promise.all(Array.from({ length: 20 }, () => asPerson(member, tx => count(tx, project))))
    const after = await Promise.all(Array.from({ length: 20 }, () => asSystem('session', whoAsks)))
    expect(after.filter(settings => settings?.person)).toEqual([])
  })

  it('undoes everything when the work fails', async () => {
    const member = await personId(people.member)
    const id = v7()
    await expect(asPerson(member, async (tx) => {
      await tx.insert(project).values({ id, name: 'half made', createdBy: member })
      throw new Error('stop')
    })).rejects.toThrow('stop')
    expect(await asPerson(member, tx => tx.$count(project, sql`id = ${id}`))).toBe(0)
  })
})

describe('the door for the system', () => {
  it('reaches what sign-in needs and nothing that labs measured', async () => {
    await asSystem('sign-in', async (tx) => {
      expect(await count(tx, credential)).toBeGreaterThan(0)
      expect(await count(tx, project)).toBe(0)
      expect(await count(tx, campaign)).toBe(0)
      expect(await count(tx, reading)).toBe(0)
    })
  })
})

describe('the door for review links', () => {
  it('says which record is asked for and shows nothing else', async () => {
    const record = v7()
    await asReviewLink(record, async (tx) => {
      expect(await whoAsks(tx)).toMatchObject({ record })
      for (const table of [project, campaign, reading, session, credential]) expect(await count(tx, table)).toBe(0)
    })
  })
})
