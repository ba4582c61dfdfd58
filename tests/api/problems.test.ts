import { describe, expect, it } from 'vitest'
import { problemContract } from '#shared/contracts/problem'
import { address, nobody, signedInAs } from './support/server'

const sendText = (text: string, type = 'application/json') => nobody().post('/api/v1/fit').set('content-type', type).send(text)
const problem = /^application\/problem\+json/

describe('a problem', () => {
  it.each([
    ['JSON that is cut off', '{"model":', 'application/json', 400, /not JSON/],
    ['NaN in place of a number', '{"model":"linear","points":[{"x":NaN,"y":1}]}', 'application/json', 400, /no NaN/],
    ['no body', '', 'application/json', 400, /no body/],
    ['a body that is no JSON', 'model=linear', 'application/x-www-form-urlencoded', 415, /content-type: application\/json/],
  ])('of %s says what to send', async (_, text, type, status, sentence) => {
    const response = await sendText(text, type).expect(status).expect('content-type', problem)
    expect(problemContract.parse(response.body).detail).toMatch(sentence)
  })

  it('of a list in place of an object is told at the root', async () => {
    const { body } = await sendText('[]').expect(400)
    expect(problemContract.parse(body).errors).toEqual([{ path: '', message: 'must be an object, not a list' }])
  })

  it.each([['/api/nothing'], ['/api/v1/nothing/here']])('of an unknown address is no page for people: %s', async (path) => {
    const response = await nobody().get(path).expect(404).expect('content-type', problem)
    expect(problemContract.parse(response.body).status).toBe(404)
  })

  it('of a wrong method says so', async () => {
    const response = await nobody().get('/api/v1/fit').set('accept', 'text/html').expect(405).expect('content-type', problem).expect('allow', 'POST')
    expect(problemContract.parse(response.body).errors).toEqual([])
  })

  it('of a wrong page of a list names the cursor', async () => {
    const { body } = await (await signedInAs('owner')).get('/api/v1/projects?cursor=zzz&limit=5').expect(400)
    expect(body.errors[0].path).toBe('query.cursor')
  })
})

describe('every answer', () => {
  it('carries a request id, the caller\'s own where it sends one', async () => {
    const own = await nobody().get('/api/health').set('x-request-id', 'made-by-the-caller').expect(200)
    expect(own.headers['x-request-id']).toBe('made-by-the-caller')
    const given = await nobody().get('/api/health').set('x-request-id', '<script>').expect(200)
    expect(given.headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/)
  })

  it('lets no other site read it', async () => {
    const { headers } = await nobody().get('/api/health').set('origin', 'https://elsewhere.example').expect(200)
    expect(headers['access-control-allow-origin']).toBeUndefined()
  })

  it('of a page allows only its own scripts', async () => {
    const { headers } = await nobody().get('/').expect(200)
    const policy = String(headers['content-security-policy'])
    expect(policy).toMatch(/default-src 'none'/)
    expect(policy).toMatch(/script-src 'self' 'strict-dynamic' 'nonce-[\w+/=]+'/)
    expect(policy).not.toMatch(/unsafe-eval|script-src[^;]*unsafe-inline/)
    expect(headers['x-powered-by']).toBeUndefined()
  })
})

describe('a form on another site', () => {
  const signOut = () => nobody().post('/api/auth/sign-out')

  it('is refused by its origin, by what the browser says, and by a missing origin', async () => {
    await signOut().set('origin', 'https://elsewhere.example').expect(403).expect('content-type', problem)
    await signOut().set('origin', 'null').expect(403)
    await signOut().set('sec-fetch-site', 'cross-site').expect(403)
  })

  it('is told apart from our own pages', async () => {
    await signOut().set('origin', address).set('sec-fetch-site', 'same-origin').expect(204)
  })
})

describe('health and readiness', () => {
  it('are told without an account', async () => {
    await nobody().get('/api/health').expect(200, { status: 'alive' })
    await nobody().get('/api/ready').expect(200, { status: 'ready' })
  })
})
