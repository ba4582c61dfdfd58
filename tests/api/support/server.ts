import request from 'supertest'

/** A setting the test run must give. */
export function setting(name: 'ANIONARY_TEST_URL' | 'DATABASE_URL' | 'DATABASE_OWNER_URL'): string {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is not set: these tests run against a started stack, see npm test`)
  return value
}

export const address = setting('ANIONARY_TEST_URL')
/** Reads all of an agent's cookies. */
export const everywhere = { domain: new URL(address).hostname, path: '/', secure: false, script: false } as never

export const nobody = () => request.agent(address)

/** The demo's people by what they are to its project. */
export const people = {
  owner: 'ines@norrvik.example',
  member: 'tomas@norrvik.example',
  collaborator: 'piet@elsewhere.example',
  outsider: 'sana@shelf.example',
  admin: 'admin@anionary.example',
} as const
export type Part = keyof typeof people
export const password = 'anionary-demo'

/** A signed-in agent; its cookie is kept as a browser keeps it. */
export async function signedInAs(part: Part) {
  const agent = nobody()
  await agent.post('/api/auth/sign-in').send({ email: people[part], password }).expect(200)
  return agent
}

/** The demo project's id, as its owner sees it. */
export async function demoProject(): Promise<string> {
  const agent = await signedInAs('owner')
  const { body } = await agent.get('/api/v1/projects').expect(200)
  const found = (body.items as { id: string, name: string }[]).find(one => one.name === 'Shadehouse gel')
  if (!found) throw new Error('the demo project is not there')
  return found.id
}
