import { beforeAll, describe, expect, it } from 'vitest'
import { fitResultContract } from '#shared/contracts/fit'
import { problemContract, type Problem } from '#shared/contracts/problem'
import { fit } from '#shared/science/fitting'
import type { Point } from '#shared/science/fitting/types'
import { asOwner, clearCounters } from './support/database'
import { nobody } from './support/server'

/** Twelve readings from T0 31, c −6.5, Bmax 3, K 4 with invented scatter. */
const points: Point[] = [0, 0.05, 0.1, 0.15, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.85, 1].map((x, i) => ({
  x, y: 31 - 6.5 * x + 12 * x / (1 + 4 * x) + 0.03 * Math.sin(7 * i),
}))
const binding = { model: 'linear-langmuir' as const, points }
const written = { expression: 'a + c*x + b*k*x/(1 + k*x)', variable: 'x', parameters: { a: { start: 30 }, c: { start: -5 }, b: { start: 2 }, k: { start: 2 } } }
const post = (body: unknown) => nobody().post('/api/v1/fit').send(body as object)

async function problemOf(body: unknown): Promise<Problem> {
  const response = await post(body).expect(400).expect('content-type', /^application\/problem\+json/)
  return problemContract.parse(response.body)
}
const pathsOf = async (body: unknown) => (await problemOf(body)).errors.map(error => error.path)

beforeAll(clearCounters)

describe('POST /api/v1/fit', () => {
  it('gives what the engine gives, to the last digit', async () => {
    const { body } = await post(binding).expect(200)
    expect(fitResultContract.parse(body)).toEqual(JSON.parse(JSON.stringify(fit(binding))))
  })

  it('fits an expression', async () => {
    const { body } = await post({ model: written, points }).expect(200)
    const fitted = fitResultContract.parse(body)
    expect(fitted).toMatchObject({ model: 'expression', converged: true, n: 12 })
    // The same curve as the named model, so the same constants, within what two ways of stopping may differ by.
    fit(binding).parameters.forEach(({ estimate }, i) => expect(fitted.parameters[i]!.estimate! / estimate!).toBeCloseTo(1, 6))
  })

  it('holds fixed parameters and says so', async () => {
    const { body } = await post({ ...binding, parameters: { T0: { fixed: 31 } } }).expect(200)
    expect(body.parameters[0]).toMatchObject({ name: 'T0', estimate: 31, fixed: true, standardError: null })
    expect(body.covariance).toHaveLength(3)
  })

  it.each([
    ['all readings alike', points.map(({ x }) => ({ x, y: 30 }))],
    ['a straight line', points.map(({ x }) => ({ x, y: 30 - 7 * x }))],
  ])('invents no constant for %s', async (_, given) => {
    const { body } = await post({ model: 'linear-langmuir', points: given }).expect(200)
    expect(body.parameters.find((one: { name: string }) => one.name === 'K').estimate).toBeNull()
    expect(body.notes.map((note: { code: string }) => note.code)).toContain('binding-not-identified')
  })

  it('takes duplicated points as repeated readings', async () => {
    const { body } = await post({ ...binding, points: [...points, ...points] }).expect(200)
    expect(body).toMatchObject({ n: 24, converged: true })
  })

  it('takes an sd of 0 as the resolution of the reading and says so', async () => {
    const rounded = points.map(({ x, y }) => ({ x, y: Math.round(y * 100) / 100, sd: 0 }))
    const { body } = await post({ ...binding, points: rounded, weighting: 'sd' }).expect(200)
    expect(body.notes.map((note: { code: string }) => note.code)).toContain('resolution-floor')
  })
})

describe('unusable input', () => {
  const withFirst = (change: object) => ({ ...binding, points: [{ ...points[0], ...change }, ...points.slice(1)] })

  it.each<[string, unknown, string]>([
    ['no points', { ...binding, points: [] }, 'points'],
    ['one point', { ...binding, points: points.slice(0, 1) }, 'points'],
    ['all x equal', { ...binding, points: points.map(({ y }) => ({ x: 1, y })) }, 'points'],
    ['text', withFirst({ y: '31.0' }), 'points.0.y'],
    ['NaN as text', withFirst({ y: 'NaN' }), 'points.0.y'],
    ['Infinity as text', withFirst({ x: 'Infinity' }), 'points.0.x'],
    ['null', withFirst({ x: null }), 'points.0.x'],
    ['1e308', withFirst({ y: 1e308 }), 'points.0.y'],
    ['a negative concentration', withFirst({ x: -1 }), 'points.0.x'],
    ['a negative sd', withFirst({ sd: -0.1 }), 'points.0.sd'],
    ['n of 0', withFirst({ n: 0 }), 'points.0.n'],
    ['a fractional n', withFirst({ n: 1.5 }), 'points.0.n'],
    ['a misspelt field', withFirst({ std: 1 }), 'points.0.std'],
    ['too many points', { ...binding, points: Array.from({ length: 5_001 }, (_, i) => ({ x: i, y: i })) }, 'points'],
    ['contradictory bounds', { ...binding, parameters: { K: { min: 5, max: 1 } } }, 'parameters.K'],
    ['fixed outside bounds', { ...binding, parameters: { K: { fixed: 9, max: 5 } } }, 'parameters.K.fixed'],
    ['an unknown parameter', { ...binding, parameters: { Q: { fixed: 1 } } }, 'parameters.Q'],
    ['an unknown model', { ...binding, model: 'cubic' }, 'model'],
    ['no model', { points }, 'model'],
    ['absolute without sds', { ...binding, sdMeaning: 'absolute' }, 'sdMeaning'],
    ['a level of 1', { ...binding, confidence: 1 }, 'confidence'],
  ])('%s is told with its place', async (_, body, path) => {
    expect(await pathsOf(body)).toContain(path)
  })

  it('is told all at once, whether the shape or the numbers are wrong', async () => {
    const body = { model: 'linear-langmuir', points: [{ x: 'a', y: 1, sd: -1 }], parameters: { Q: { fixed: 1 } }, weighting: 'heavy' }
    expect(new Set(await pathsOf(body))).toEqual(new Set(['points.0.x', 'points.0.sd', 'points', 'parameters.Q', 'weighting']))
  })

  it('is told in a sentence that quotes what came', async () => {
    const { errors } = await problemOf(withFirst({ y: 'NaN' }))
    expect(errors[0]!.message).toBe('must be a finite number, not the text "NaN"')
  })

  it('of 100,000 points is told the limit', async () => {
    const { errors } = await problemOf({ ...binding, points: Array.from({ length: 100_000 }, (_, i) => ({ x: i / 1e5, y: 31.123456, sd: 0.012345, n: 3 })) })
    expect(errors).toEqual([{ path: 'points', message: 'at most 5000 points in one fit' }])
  })

  it('of thousands of bad points is told without drowning the reader', async () => {
    const { errors, detail } = await problemOf({ ...binding, points: Array.from({ length: 4_000 }, () => ({ x: 'a', y: 1 })) })
    expect(errors).toHaveLength(201)
    expect(errors.at(-1)).toEqual({ path: '', message: 'and 3801 more of the kind' })
    expect(detail).toMatch(/^4001 things/)
  })

  it('beyond the size of a body is refused in a sentence', async () => {
    const response = await post({ ...binding, points: Array.from({ length: 250_000 }, (_, i) => ({ x: i / 7, y: 31.123456, sd: 0.012345, n: 3 })) }).expect(413)
    expect(problemContract.parse(response.body).detail).toMatch(/larger than 12 MB/)
  })
})

describe('an expression', () => {
  const asked = (expression: string, parameters: object = { a: { start: 1 } }) => ({ model: { expression, variable: 'x', parameters }, points })

  it.each([
    ['is nested too deep', '('.repeat(60) + 'a*x' + ')'.repeat(60)],
    ['is too long', `a*x${'+x'.repeat(400)}`],
    ['calls a function outside the list', 'a*import(x)'],
    ['evaluates text', 'a*evaluate("1")'],
    ['assigns', 'a=x'],
    ['defines a function', 'f(x)=a*x'],
    ['runs several statements', 'a*x; a*x'],
    ['counts over a range', 'a*sum(1:1000000000)*x'],
    ['reaches for a prototype', 'a*x.constructor.constructor("return process")()'],
    ['indexes', 'a*x["constructor"]'],
    ['makes a matrix', 'a*[x,x]'],
    ['does not depend on its parameter', '2*x'],
    ['uses a name that nobody declared', 'a*x+z'],
    ['cannot be read', 'a*(x'],
    ['is empty', ''],
  ])('that %s is refused with its place', async (_, expression) => {
    expect(await pathsOf(asked(expression))).toContain('model.expression')
  })

  it('takes no parameter named like a prototype', async () => {
    const body = `{"model":{"expression":"a*x","variable":"x","parameters":{"a":{"start":1},"__proto__":{"start":1},"constructor":{"start":1}}},"points":${JSON.stringify(points)}}`
    await nobody().post('/api/v1/fit').set('content-type', 'application/json').send(body).expect(400)
  })

  it('that is slow is stopped, and others are answered meanwhile', async () => {
    const many = Array.from({ length: 5_000 }, (_, i) => ({ x: i / 5_000, y: Math.sin(i) }))
    const slow = post({ model: { expression: `a*${'sin('.repeat(20)}b*x${')'.repeat(20)}`, variable: 'x', parameters: { a: { start: 1, min: -9, max: 9 }, b: { start: 1, min: -900, max: 900 } } }, points: many })
    const [{ status }] = await Promise.all([slow, post(binding).expect(200)])
    expect([200, 400]).toContain(status)
  })
})

describe('the limit a minute', () => {
  it('answers 429 and says when to come back', async () => {
    await post(binding).expect(200)
    // Both this minute and the next, should the clock turn in between.
    await asOwner(client => client.query(`with callers as (select distinct key from rate_limit where key like 'fit:%')
      insert into rate_limit (key, minute, count) select key, date_trunc('minute', now()) + step * interval '1 minute', 1000000 from callers, generate_series(0, 1) as step
      on conflict (key, minute) do update set count = 1000000`))
    const response = await post(binding).expect(429)
    expect(Number(response.headers['retry-after'])).toBeGreaterThan(0)
    expect(problemContract.parse(response.body).detail).toMatch(/Wait \d+ seconds/)
    await clearCounters()
    await post(binding).expect(200)
  })
})
