import { describe, expect, it } from 'vitest'
import { asApp, asOwner, personId, refusalOf } from './support/database'
import { people } from './support/server'

const history = ['series_revision', 'reading', 'revision_reading', 'fit', 'fit_revision', 'fit_blank', 'fit_result', 'audit_event', 'batch_revision', 'batch_revision_reading']
const refusedByTrigger = '23001'
const insufficientPrivilege = '42501'
const column = (table: string) => table === 'audit_event' ? 'action' : 'project_id'
const attempts = (table: string) => [`update "${table}" set "${column(table)}" = "${column(table)}"`, `delete from "${table}"`, `truncate "${table}" cascade`]

describe.each(history)('the history in %s', (table) => {
  it('is refused to be changed, deleted or emptied even by the owner of the tables', async () => {
    const codes = await asOwner(async (client) => {
      await client.query('begin')
      const found = []
      for (const attempt of attempts(table)) found.push(await refusalOf(client, attempt))
      await client.query('rollback')
      return found
    })
    expect(codes).toEqual([refusedByTrigger, refusedByTrigger, refusedByTrigger])
  })

  it('is not even offered to the service', async () => {
    const codes = await asApp(await personId(people.owner), async (client) => {
      const found = []
      for (const attempt of attempts(table)) found.push(await refusalOf(client, attempt))
      return found
    })
    expect(codes).toEqual([insufficientPrivilege, insufficientPrivilege, insufficientPrivilege])
  })
})

describe('emptying a table that history hangs on', () => {
  it.each(['series', 'batch', 'project', 'person'])('is refused for %s', async (table) => {
    const code = await asOwner(async (client) => {
      await client.query('begin')
      const found = await refusalOf(client, `truncate "${table}" cascade`)
      await client.query('rollback')
      return found
    })
    expect(code).toBe(refusedByTrigger)
  })
})
