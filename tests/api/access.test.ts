import { readdirSync } from 'node:fs'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { beforeAll, describe, expect, it } from 'vitest'
import { clearCounters } from './support/database'
import { address, demoProject, everywhere, nobody, signedInAs, type Part } from './support/server'

/** What each rule answers to whom, before anything is validated: 'in' is any answer but 401, 403 and 404. */
const expected: Record<string, Record<Visitor, 'in' | 401 | 403 | 404>> = {
  anyone: { 'signed out': 'in', 'owner': 'in', 'member': 'in', 'collaborator': 'in', 'outsider': 'in', 'admin': 'in' },
  signedIn: { 'signed out': 401, 'owner': 'in', 'member': 'in', 'collaborator': 'in', 'outsider': 'in', 'admin': 'in' },
  projectMember: { 'signed out': 401, 'owner': 'in', 'member': 'in', 'collaborator': 'in', 'outsider': 404, 'admin': 404 },
  projectEditor: { 'signed out': 401, 'owner': 'in', 'member': 'in', 'collaborator': 403, 'outsider': 404, 'admin': 404 },
  projectOwner: { 'signed out': 401, 'owner': 'in', 'member': 403, 'collaborator': 403, 'outsider': 404, 'admin': 404 },
  ...Object.fromEntries(['campaign', 'batch', 'series', 'sample', 'stock', 'import'].flatMap(thing => [
    [`${thing}Reader`, { 'signed out': 401, 'owner': 'in', 'member': 'in', 'collaborator': 'in', 'outsider': 404, 'admin': 404 }],
    [`${thing}Editor`, { 'signed out': 401, 'owner': 'in', 'member': 'in', 'collaborator': 403, 'outsider': 404, 'admin': 404 }],
  ])),
  instrumentEditor: { 'signed out': 401, 'owner': 'in', 'member': 'in', 'collaborator': 403, 'outsider': 404, 'admin': 404 },
  jobWatcher: { 'signed out': 401, 'owner': 'in', 'member': 'in', 'collaborator': 'in', 'outsider': 404, 'admin': 404 },
  jobOwner: { 'signed out': 401, 'owner': 'in', 'member': 403, 'collaborator': 403, 'outsider': 404, 'admin': 404 },
}

type Visitor = 'signed out' | Part
const visitors: Visitor[] = ['signed out', 'owner', 'member', 'collaborator', 'outsider', 'admin']
type Agent = ReturnType<typeof nobody>
type Method = 'get' | 'post' | 'put' | 'patch' | 'delete'
interface Operation { method: Method, path: string, rule: string }

interface Description {
  'paths': Record<string, Partial<Record<Method, { 'x-access': string, 'summary': string }>>>
  'x-library-routes': string[]
}

const description = await nobody().get('/api/v1/openapi.json').then(({ body }) => body as Description)
const operations: Operation[] = Object.entries(description.paths).flatMap(([path, methods]) =>
  Object.entries(methods).map(([method, operation]) => ({ method: method as Method, path, rule: operation['x-access'] })))

const places: Record<string, string> = {}
const agents = new Map<Visitor, Agent>()

beforeAll(async () => {
  await clearCounters()
  agents.set('signed out', nobody())
  for (const visitor of visitors) if (visitor !== 'signed out') agents.set(visitor, await signedInAs(visitor))
  const owner = agents.get('owner')!
  places.project = await demoProject()
  places.series = (await owner.get(`/api/v1/projects/${places.project}/series`).expect(200)).body.items[0].id
  const { samples, stocks, instruments } = (await owner.get(`/api/v1/projects/${places.project}/materials`).expect(200)).body
  places.sample = samples[0].id
  places.stock = stocks[0].id
  places.instrument = instruments.find((one: { lab: { name: string } }) => one.lab.name === 'Norrvik').id
  const { campaigns } = (await owner.get(`/api/v1/projects/${places.project}`).expect(200)).body
  places.campaign = campaigns[0].id
  places.batch = (await owner.get(`/api/v1/campaigns/${places.campaign}`).expect(200)).body.batches[0].id
  // A salt that has to be decided first keeps a commit from adding readings to the demonstration.
  places.import = (await owner.post(`/api/v1/campaigns/${places.campaign}/imports`).send({ text: 'salt,conc (M),T (°C)\nNaSNC,0.1,30\nNaSNC,0.2,29' }).expect(201)).body.id
  places.job = (await owner.post(`/api/v1/projects/${places.project}/refit`).expect(202)).body.id
})

describe('the registry', () => {
  it('holds a declaration for every file under server/api', () => {
    const folder = fileURLToPath(new URL('../../server/api', import.meta.url))
    const fallback = '[...].ts'
    const files = readdirSync(folder, { recursive: true, withFileTypes: true }).filter(entry => entry.isFile()).map(entry => join(entry.parentPath, entry.name).slice(folder.length))
    const undeclared = files.filter(file => file !== `/${fallback}`).filter((file) => {
      const [, stem, method] = /^(.*)\.(\w+)\.ts$/.exec(file) ?? []
      const path = `/api${stem?.replace(/\/index$/, '').replace(/\[(\w+)\]/g, '{$1}')}`
      return !operations.some(one => one.path === path && one.method === method)
    })
    expect(undeclared).toEqual([])
  })

  it('names every route that libraries bring', () => {
    expect(description['x-library-routes']).toEqual(['delete /api/_auth/session', 'get /api/_auth/session'])
  })

  it('knows the outcome of every rule in use', () => {
    expect(operations.map(one => one.rule).filter(rule => !(rule in expected))).toEqual([])
  })
})

describe.each(operations)('$method $path ($rule)', ({ method, path, rule }) => {
  it.each(visitors)('answers as its rule says to: %s', async (visitor) => {
    // Signing in and out would end the sessions this test stands on.
    const agent = path.startsWith('/api/auth/') ? nobody() : agents.get(visitor)!
    const place = path.replace(/\{(\w+)\}/g, (_, name: string) => places[name] ?? '1')
    const status = await statusOf(agent, method, place)
    const outcome = expected[rule]![visitor]
    if (outcome === 'in') expect([401, 403, 404]).not.toContain(status)
    else expect(status).toBe(outcome)
  })
})

// An empty body is invalid everywhere, so nothing is made; a stream is left as soon as its head is there.
async function statusOf(agent: Agent, method: Method, place: string): Promise<number> {
  if (place.endsWith('/events')) return headOf(agent, place)
  const call = agent[method](place)
  return (await (method === 'get' ? call : call.send({}))).status
}

async function headOf(agent: Agent, path: string): Promise<number> {
  const leave = new AbortController()
  const cookie = agent.jar.getCookies(everywhere).toValueString()
  const { status } = await fetch(`${address}${path}`, { headers: { cookie }, signal: leave.signal })
  leave.abort()
  return status
}

describe('what is not there', () => {
  it.each(['project', 'series', 'job'])('is 404 for a made-up %s and for an id that is none', async (kind) => {
    const owner = agents.get('owner')!
    const base = { project: '/api/v1/projects/', series: '/api/v1/series/', job: '/api/v1/jobs/' }[kind]!
    await owner.get(`${base}0197a000-0000-7000-8000-000000000000`).expect(404)
    await owner.get(`${base}not-an-id`).expect(404)
  })
})
