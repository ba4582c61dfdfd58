import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { meContract } from '#shared/contracts/me'
import { problemContract } from '#shared/contracts/problem'
import { asOwner, clearCounters, personId } from './support/database'
import { nobody, password, people, signedInAs } from './support/server'

const attempt = (email: string, given: string) => nobody().post('/api/auth/sign-in').send({ email, password: given })
/** Lets the waiting pass by moving it into the past. */
const letWaitPass = () => asOwner(client => client.query('update sign_in_attempt set blocked_until = now() - interval \'1 second\''))
/** Every try in these tests comes from one network address; with its row gone, the account's own wait is seen alone. */
const forgetAddress = () => asOwner(client => client.query('delete from sign_in_attempt where key like \'address:%\''))

beforeEach(clearCounters)
afterEach(clearCounters)

describe('signing in', () => {
  it('opens a session that says who one is, with labs and projects', async () => {
    const agent = nobody()
    const { body } = await agent.post('/api/auth/sign-in').send({ email: people.owner, password }).expect(200)
    expect(meContract.parse(body)).toMatchObject({ person: { email: people.owner }, labs: [{ lab: { name: 'Norrvik' }, role: 'lead' }] })
    const me = await agent.get('/api/v1/me').expect(200)
    expect(me.body.projects).toContainEqual({ project: { id: expect.any(String), name: 'Shadehouse gel' }, role: 'owner' })
  })

  it('takes an address in any case', async () => {
    await attempt(people.owner.toUpperCase(), password).expect(200)
  })

  it('seals the cookie and keeps it from scripts and other sites', async () => {
    const { headers } = await attempt(people.owner, password).expect(200)
    const [cookie] = headers['set-cookie'] as unknown as string[]
    expect(cookie).toMatch(/^anionary-session=Fe26\.2\*\*/)
    expect(cookie).toMatch(/HttpOnly/)
    expect(cookie).toMatch(/SameSite=Lax/)
  })

  it('leaves an entry in the trail that holds an id and no name', async () => {
    await signedInAs('owner')
    const id = await personId(people.owner)
    const { rows } = await asOwner(client => client.query('select * from audit_event where person_id = $1 and action = \'signed-in\' order by at desc limit 1', [id]))
    expect(rows).toHaveLength(1)
    expect(JSON.stringify(rows)).not.toMatch(/Ines|norrvik/i)
  })

  it('gives no cookie to who only looks', async () => {
    const { headers } = await nobody().get('/api/v1/me').expect(401)
    expect(headers['set-cookie']).toBeUndefined()
  })
})

describe('what does not open', () => {
  it('answers alike for an unknown address and a wrong password', async () => {
    const unknown = await attempt('nobody@nowhere.example', password).expect(401)
    const wrong = await attempt(people.owner, 'not the password').expect(401)
    expect(unknown.body).toEqual(wrong.body)
    expect(Object.keys(unknown.headers)).toEqual(Object.keys(wrong.headers))
  })

  it('looks up a password hash of the same cost for an unknown address', async () => {
    const { rows } = await asOwner(client => client.query('select password_hash from credential limit 1'))
    expect(rows[0].password_hash).toMatch(/^\$scrypt\$n=16384,r=8,p=1\$/)
  })

  it('is told with every field at once', async () => {
    const { body } = await nobody().post('/api/auth/sign-in').send({ email: 'x', password: '' }).expect(400)
    expect(problemContract.parse(body).errors.map(error => error.path)).toEqual(['email', 'password'])
  })

  it('is a deactivated account', async () => {
    const id = await personId(people.outsider)
    await asOwner(client => client.query('update person set deactivated_at = now() where id = $1', [id]))
    try {
      await attempt(people.outsider, password).expect(401)
    }
    finally {
      await asOwner(client => client.query('update person set deactivated_at = null where id = $1', [id]))
    }
  })
})

describe('misses', () => {
  const missFiveTimes = async (email: string) => {
    for (let miss = 0; miss < 5; miss++) await attempt(email, 'wrong').expect(401)
  }

  it('cost a wait from the fifth on, even for the right password', async () => {
    await missFiveTimes(people.collaborator)
    const { body, headers } = await attempt(people.collaborator, password).expect(429)
    expect(Number(headers['retry-after'])).toBeGreaterThan(0)
    expect(problemContract.parse(body).detail).toMatch(/Wait \d+ seconds/)
  })

  it('count for the account wherever they come from', async () => {
    await missFiveTimes(people.collaborator)
    await forgetAddress()
    await attempt(people.collaborator, password).expect(429)
    await attempt(people.owner, password).expect(200)
  })

  it('count for the network address whatever account they try', async () => {
    for (let miss = 0; miss < 5; miss++) await attempt(`guess${miss}@nowhere.example`, 'wrong').expect(401)
    await attempt(people.owner, password).expect(429)
  })

  it('cost twice the wait with each further one', async () => {
    await missFiveTimes('guess@nowhere.example')
    const waits = []
    for (let miss = 0; miss < 3; miss++) {
      const { headers } = await attempt('guess@nowhere.example', 'wrong').expect(429)
      waits.push(Number(headers['retry-after']))
      await letWaitPass()
      await attempt('guess@nowhere.example', 'wrong').expect(401)
    }
    expect(waits).toEqual([15, 30, 60])
  })

  it('are forgotten for the account once it opens', async () => {
    await missFiveTimes(people.collaborator)
    await letWaitPass()
    await attempt(people.collaborator, password).expect(200)
    await forgetAddress()
    await attempt(people.collaborator, 'wrong').expect(401)
  })

  it('made all at once gain no more tries than one after another', async () => {
    const answers = await Promise.all(Array.from({ length: 12 }, () => attempt(people.collaborator, 'wrong')))
    expect(answers.filter(({ status }) => status === 401)).toHaveLength(5)
  })
})

describe('signing out', () => {
  it('ends the session wherever its cookie went', async () => {
    const agent = await signedInAs('member')
    const { headers } = await agent.get('/api/v1/me').expect(200)
    expect(headers['set-cookie']).toBeUndefined()
    const stolen = await nobody().post('/api/auth/sign-in').send({ email: people.member, password })
    const cookie = (stolen.headers['set-cookie'] as unknown as string[])[0]!.split(';')[0]!
    await nobody().get('/api/v1/me').set('cookie', cookie).expect(200)
    await nobody().post('/api/auth/sign-out').set('cookie', cookie).expect(204)
    await nobody().get('/api/v1/me').set('cookie', cookie).expect(401)
    await agent.get('/api/v1/me').expect(200)
  })

  it('does nothing without a session', async () => {
    await nobody().post('/api/auth/sign-out').expect(204)
  })
})
