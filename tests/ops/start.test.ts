import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs'
import { chmod, mkdtemp } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { isRoot } from '../../scripts/lib/places.mjs'
import { freePort, isFree } from '../../scripts/lib/ports.mjs'
import { startedAt, until } from '../../scripts/lib/processes.mjs'
import { removeData } from '../../scripts/lib/throw-away.mjs'
import { Command } from './command'

const ready = 'Ctrl-C stops everything'

let data: string
let env: Record<string, string>
let port: number
const commands: Command[] = []

const run = (script: string, more: Record<string, string> = {}, args: string[] = []) => {
  const command = new Command(script, { ...env, ...more }, args)
  commands.push(command)
  return command
}
const start = (more: Record<string, string> = {}) => run('scripts/start.mjs', more)

const serverProcess = () => Number(readFileSync(join(data, 'postgres', 'postmaster.pid'), 'utf8').split('\n')[0])

beforeAll(async () => {
  data = await mkdtemp(join(tmpdir(), 'anionary-start-'))
  await chmod(data, 0o711)
  port = await freePort()
  env = { ANIONARY_DATA: data, PORT: String(port), NODE_ENV: 'production' }
})

// One that a failed test left running must not fail the next.
afterEach(async () => {
  await Promise.all(commands.splice(0).map(command => command.end('SIGTERM')))
})

afterAll(() => removeData(data))

describe('npm start', () => {
  it('brings everything up without a terminal, prints address and demo accounts, and ends cleanly', async () => {
    const first = start()
    await first.prints(ready)
    expect(first.output).toContain(`http://127.0.0.1:${port}`)
    expect(first.output).toContain('ines@norrvik.example')
    expect((await fetch(`http://127.0.0.1:${port}/api/ready`)).status).toBe(200)
    expect(await first.end('SIGINT')).toBe(0)
    expect(await isFree(port)).toBe(true)
    expect(readdirSync(join(data, 'postgres'))).not.toContain('postmaster.pid')
  })

  it('keeps its secrets from other accounts', () => {
    expect(statSync(join(data, 'secrets.json')).mode & 0o077).toBe(0)
    expect(statSync(join(data, 'mail')).mode & 0o077).toBe(0)
  })

  it('takes over a PostgreSQL that a crash left running, and the rest has stopped itself', async () => {
    const crashed = start()
    await crashed.prints(ready)
    const orphan = serverProcess()
    await crashed.end('SIGKILL')
    expect(startedAt(orphan)).not.toBeNull()
    const next = start()
    await next.prints(ready)
    expect(next.output).toContain(`process ${orphan}`)
    expect(serverProcess()).toBe(orphan)
    expect(await next.end('SIGTERM')).toBe(0)
    expect(startedAt(orphan)).toBeNull()
  })

  it('refuses a second run on the same folder, a taken port and a wrong one in a sentence each', async () => {
    const first = start()
    await first.prints(ready)
    const second = start({ PORT: String(await freePort()) })
    expect(await second.ended).toBe(1)
    expect(second.output).toMatch(/already runs from .* set ANIONARY_DATA and PORT/)
    const elsewhere = start({ ANIONARY_DATA: join(data, 'other') })
    expect(await elsewhere.ended).toBe(1)
    expect(elsewhere.output).toMatch(new RegExp(`port ${port} is taken .* PORT=`))
    const wrong = start({ ANIONARY_DATA: join(data, 'other'), PORT: 'many' })
    expect(await wrong.ended).toBe(1)
    expect(wrong.output).toMatch(/PORT is many/)
    expect(await first.end('SIGTERM')).toBe(0)
  })

  it('refuses to open a database with demo accounts when ANIONARY_DEMO is 0', async () => {
    const real = start({ ANIONARY_DEMO: '0' })
    expect(await real.ended).toBe(1)
    expect(real.output).toMatch(/holds the demo accounts.*ANIONARY_DATA/)
  })

  it('reports a database that dies under it and stops the rest', async () => {
    const first = start()
    await first.prints(ready)
    process.kill(serverProcess(), 'SIGQUIT')
    expect(await first.ended).toBe(1)
    expect(first.output).toMatch(/PostgreSQL .*ended by itself/)
    expect(await until(() => isFree(port), 10)).toBe(true)
  })
})

describe('npm run backup and restore', () => {
  it('bring back what was there, and keep what they replace', async () => {
    const file = join(data, 'kept.tar')
    const backup = run('scripts/backup.mjs', {}, [file])
    expect(await backup.ended, backup.output).toBe(0)
    const restore = run('scripts/restore.mjs', {}, [file])
    expect(await restore.ended, restore.output).toBe(0)
    expect(restore.output).toContain(join(data, 'backups'))
    const after = start()
    await after.prints(ready)
    const answer = await fetch(`http://127.0.0.1:${port}/api/auth/sign-in`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'origin': `http://127.0.0.1:${port}` },
      body: JSON.stringify({ email: 'ines@norrvik.example', password: 'anionary-demo' }),
    })
    expect(answer.ok).toBe(true)
    expect(await after.end('SIGTERM')).toBe(0)
  })

  it('refuse a file that is no backup and leave the database alone', async () => {
    const wrong = run('scripts/restore.mjs', {}, [join(data, 'secrets.json')])
    expect(await wrong.ended).toBe(1)
    expect(wrong.output).toContain('is not a backup of Anionary')
  })
})

describe('a data folder in a home that nobody else may enter', () => {
  it('has its database where its PostgreSQL can reach it: for root in the system state folder, which it names', async () => {
    const hidden = await mkdtemp(join(tmpdir(), 'anionary-hidden-'))
    const settings = { ANIONARY_DATA: join(hidden, 'data'), PORT: String(await freePort()) }
    const first = start(settings)
    await first.prints(ready)
    // As root PostgreSQL runs as another user; an ordinary user's own server goes wherever that user may.
    const named = join(hidden, 'data', 'where')
    const where = existsSync(named) ? readFileSync(named, 'utf8').trim() : join(hidden, 'data', 'postgres')
    expect(where).toMatch(isRoot ? /^\/var\/lib\/anionary\/[0-9a-f]{16}\/postgres$/ : /anionary-hidden-\w+\/data\/postgres$/)
    expect(existsSync(join(where, 'PG_VERSION'))).toBe(true)
    expect(first.output.includes(where)).toBe(isRoot)
    expect(await first.end('SIGTERM')).toBe(0)
    const backup = run('scripts/backup.mjs', settings)
    expect(await backup.ended, backup.output).toBe(0)
    removeData(join(hidden, 'data'))
    removeData(hidden)
  })
})
