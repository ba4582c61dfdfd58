import { beforeAll, describe, expect, it } from 'vitest'
import { v7 } from 'uuid'
import { asApp, asOwner, personId, refusalOf, tablesOf } from './support/database'
import { people } from './support/server'

const insufficientPrivilege = '42501'

async function visibleRows(person: string | null): Promise<Record<string, number>> {
  return asApp(person, async (client) => {
    const seen: Record<string, number> = {}
    for (const table of await tablesOf(client)) {
      if (await refusalOf(client, `select 1 from "${table}" limit 1`) !== null) continue
      const { rows } = await client.query<{ count: string }>(`select count(*) from "${table}"`)
      if (rows[0]!.count !== '0') seen[table] = Number(rows[0]!.count)
    }
    return seen
  })
}

describe('the role that serves', () => {
  it('owns nothing and passes no policy', async () => {
    const { rows } = await asOwner(client => client.query(`select rolsuper, rolbypassrls,
      (select count(*) from pg_class c where c.relowner = r.oid)::int as owned from pg_roles r where rolname = 'anionary_app'`))
    expect(rows).toEqual([{ rolsuper: false, rolbypassrls: false, owned: 0 }])
  })

  it('may empty no table', async () => {
    const { rows } = await asOwner(client => client.query(`select table_name from information_schema.role_table_grants
      where grantee = 'anionary_app' and privilege_type = 'TRUNCATE'`))
    expect(rows).toEqual([])
  })

  it('finds row-level security on every table', async () => {
    const { rows } = await asOwner(client => client.query(`select relname from pg_class
      where relnamespace = 'public'::regnamespace and relkind in ('r', 'p') and not relrowsecurity`))
    expect(rows).toEqual([])
  })
})

describe('what is seen', () => {
  it('is nothing with nobody set', async () => {
    expect(await visibleRows(null)).toEqual({})
  })

  it('is nothing for a person who does not exist', async () => {
    expect(await visibleRows(v7())).toEqual({})
  })

  it('is only themselves for a person without lab and project', async () => {
    const newcomer = v7()
    await asOwner(client => client.query('insert into person (id, name, email) values ($1, $2, $3)', [newcomer, 'A newcomer', `${newcomer}@elsewhere.example`]))
    expect(await visibleRows(newcomer)).toEqual({ person: 1 })
  })

  it('is the project for its members', async () => {
    const seen = await visibleRows(await personId(people.collaborator))
    expect(Object.keys(seen)).toEqual(expect.arrayContaining(['project', 'campaign', 'series', 'series_revision', 'reading']))
  })

  it('is never a password', async () => {
    for (const person of [people.owner, people.admin]) expect(await visibleRows(await personId(person))).not.toHaveProperty('credential')
  })
})

describe('what is written', () => {
  let project: string
  let campaign: string
  beforeAll(async () => {
    const { rows } = await asOwner(client => client.query('select c.id, c.project_id from campaign c join project p on p.id = c.project_id where p.name = \'Shadehouse gel\' limit 1'))
    campaign = rows[0].id
    project = rows[0].project_id
  })

  const newSeries = 'insert into series (id, project_id, campaign_id, salt_formula, salt_name, anion, cation) values ($1, $2, $3, \'KCl\', \'potassium chloride\', \'Cl^-\', \'K^+\')'
  const writes = async (email: string | null) => asApp(email && await personId(email), client =>
    refusalOf(client, newSeries, [v7(), project, campaign]))

  it('is let through for an editor', async () => {
    expect(await writes(people.member)).toBeNull()
  })

  it.each([['a collaborator', people.collaborator], ['an outsider', people.outsider], ['an administrator', people.admin], ['nobody', null]])('is refused for %s', async (_, email) => {
    expect(await writes(email)).toBe(insufficientPrivilege)
  })

  it('carries the name of whoever asks and of nobody else', async () => {
    const other = await personId(people.owner)
    const code = await asApp(await personId(people.member), async (client) => {
      const { rows } = await client.query('select id from series limit 1')
      return refusalOf(client, 'insert into series_revision (id, project_id, series_id, number, summary, made_by) values ($1, $2, $3, 999, \'forged\', $4)', [v7(), project, rows[0].id, other])
    })
    expect(code).toBe(insufficientPrivilege)
  })

  it('cannot hang a reading of one project into another', async () => {
    const foreignKeyViolation = '23503'
    const member = await personId(people.member)
    const code = await asApp(member, async (client) => {
      const own = v7()
      await client.query('insert into project (id, name, created_by) values ($1, \'mine\', $2)', [own, member])
      return refusalOf(client, newSeries, [v7(), own, campaign])
    })
    expect(code).toBe(foreignKeyViolation)
  })
})

describe('what measuring writes', () => {
  let place: { project: string, batch: string, campaign: string, lab: string, upload: string }
  beforeAll(async () => {
    const { rows } = await asOwner(client => client.query(`select c.project_id as project, c.id as campaign, c.lab_id as lab, b.id as batch from batch b
      join campaign c on c.id = b.campaign_id join lab l on l.id = c.lab_id join project p on p.id = c.project_id where p.name = 'Shadehouse gel' and l.name = 'Norrvik' limit 1`))
    place = rows[0]
  })

  const as = async (email: string, statement: string, values: (who: string) => unknown[]) => {
    const who = await personId(email)
    return asApp(who, client => refusalOf(client, statement, values(who)))
  }
  const blanks = 'insert into batch_revision (id, project_id, batch_id, number, summary, made_by) values ($1, $2, $3, 999, \'x\', $4)'
  const recipe = 'insert into recipe (id, lab_id, name, signature, choices, made_by) values ($1, $2, $3, \'s\', \'{}\', $4)'
  const visit = 'insert into project_visit (project_id, person_id) values ($1, $2) on conflict (project_id, person_id) do update set at = now()'

  it('lets an editor revise blanks, in no other name', async () => {
    const other = await personId(people.owner)
    expect(await as(people.member, blanks, who => [v7(), place.project, place.batch, who])).toBeNull()
    expect(await as(people.member, blanks, () => [v7(), place.project, place.batch, other])).toBe(insufficientPrivilege)
  })

  it.each([['a collaborator', people.collaborator], ['an outsider', people.outsider]])('refuses blanks to %s', async (_, email) => {
    expect(await as(email, blanks, who => [v7(), place.project, place.batch, who])).toBe(insufficientPrivilege)
  })

  it('keeps a lab\'s recipes to its people', async () => {
    expect(await as(people.member, recipe, who => [v7(), place.lab, `mine ${v7()}`, who])).toBeNull()
    expect(await as(people.collaborator, recipe, who => [v7(), place.lab, `theirs ${v7()}`, who])).toBe(insufficientPrivilege)
    const kept = v7()
    const maker = await personId(people.member)
    await asOwner(client => client.query(recipe, [kept, place.lab, `kept ${kept}`, maker]))
    const seenBy = async (email: string) => asApp(await personId(email), async client => (await client.query('select 1 from recipe where id = $1', [kept])).rowCount)
    expect(await seenBy(people.owner)).toBe(1)
    expect(await seenBy(people.collaborator)).toBe(0)
    await asOwner(client => client.query('delete from recipe where id = $1', [kept]))
  })

  it('lets everybody note their own visit to a project they see, and see no other', async () => {
    const other = await personId(people.owner)
    expect(await as(people.collaborator, visit, who => [place.project, who])).toBeNull()
    expect(await as(people.collaborator, visit, () => [place.project, other])).toBe(insufficientPrivilege)
    expect(await as(people.outsider, visit, who => [place.project, who])).toBe(insufficientPrivilege)
    await asOwner(client => client.query(visit, [place.project, other]))
    const seen = await asApp(await personId(people.collaborator), async client => (await client.query('select 1 from project_visit where person_id = $1', [other])).rowCount)
    expect(seen).toBe(0)
  })

  it('begins a lab for nobody who is in one', async () => {
    const begin = 'select guard.begin_lab($1, $2)'
    expect(await as(people.member, begin, () => [v7(), `another ${v7()}`])).toBe(insufficientPrivilege)
    expect(await as(people.outsider, begin, () => [v7(), `a first ${v7()}`])).toBeNull()
    expect(await asApp(null, client => refusalOf(client, begin, [v7(), `nobody's ${v7()}`]))).toBe(insufficientPrivilege)
  })

  it.each([['table_import', people.outsider], ['batch_revision', people.outsider], ['batch_revision_reading', people.outsider]])('shows nothing of %s to an outsider', async (table, email) => {
    expect(await asApp(await personId(email), async client => (await client.query(`select 1 from ${table} where project_id = $1`, [place.project])).rowCount)).toBe(0)
  })
})
