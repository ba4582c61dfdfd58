import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { withoutMainCluster } from '../../../scripts/lib/debian.mjs'
import { isLocked, lock } from '../../../scripts/lib/lock.mjs'
import { checkNode } from '../../../scripts/lib/packages.mjs'
import { freePort, isFree, rememberPort, rememberedPort } from '../../../scripts/lib/ports.mjs'
import { countPlaywright, countVitest } from '../../../scripts/lib/report.mjs'
import { secretsOf } from '../../../scripts/lib/secrets.mjs'

let data: string
beforeEach(() => {
  data = mkdtempSync(join(tmpdir(), 'anionary-unit-'))
})
afterEach(() => rmSync(data, { recursive: true, force: true }))

describe('checkNode', () => {
  it.each(['20.19.0', '20.20.2', '22.0.0'])('takes %s', version => expect(() => checkNode(version)).not.toThrow())
  it.each(['18.20.0', '20.18.3'])('refuses %s and names the version to install', version => expect(() => checkNode(version)).toThrow(/install Node.js 20\.19/))
})

describe('withoutMainCluster', () => {
  it('replaces the packaged comment and any other choice', () => {
    expect(withoutMainCluster('# x\n#create_main_cluster = true\ny\n')).toBe('# x\ncreate_main_cluster = false\ny\n')
    expect(withoutMainCluster('create_main_cluster = true\n')).toBe('create_main_cluster = false\n')
  })
  it('adds the choice where there is none', () => expect(withoutMainCluster('')).toBe('create_main_cluster = false\n'))
})

describe('lock', () => {
  it('refuses a second one until the first is released', () => {
    const { release, isAfterCrash } = lock(data, 'Anionary')
    expect(isAfterCrash).toBe(false)
    expect(() => lock(data, 'Anionary')).toThrow(/Anionary already runs/)
    release()
    expect(isLocked(data)).toBe(false)
  })
  it('takes over from a process that is gone, whoever has its number now', () => {
    writeFileSync(join(data, 'running.json'), JSON.stringify({ pid: process.pid, startedAt: '1', purpose: 'Anionary' }))
    expect(lock(data, 'Anionary').isAfterCrash).toBe(true)
  })
})

describe('rememberedPort', () => {
  it('gives the same port again', async () => {
    expect(await rememberedPort(data, 'mail')).toBe(await rememberedPort(data, 'mail'))
  })
  it('gives another one when somebody listens there', async () => {
    const port = await freePort()
    rememberPort(data, 'mail', port)
    const other = createServer().listen(port, '127.0.0.1')
    await new Promise(listening => other.once('listening', listening))
    expect(await isFree(port)).toBe(false)
    expect(await rememberedPort(data, 'mail')).not.toBe(port)
    other.close()
  })
})

describe('secretsOf', () => {
  it('makes different secrets once and keeps them', () => {
    const secrets = secretsOf(data)
    expect(new Set(Object.values(secrets)).size).toBe(6)
    expect(secretsOf(data)).toEqual(secrets)
  })
})

describe('the counts of npm test', () => {
  it('take a test that was left out as failed', () => {
    expect(countVitest({ numPassedTests: 3, numFailedTests: 1, numPendingTests: 1, numTodoTests: 1 })).toEqual({ passed: 3, failed: 3 })
    expect(countPlaywright({ stats: { expected: 3, unexpected: 1, flaky: 1, skipped: 1 }, errors: [{}] })).toEqual({ passed: 3, failed: 4 })
  })
})
