import { describe, expect, it } from 'vitest'
import { projectFiles, textOf } from './sources'

const mostLines = 500
const mostLinesWithoutReason = 300

/** Text that people write; data, pictures and generated lists have no such limit. */
const written = projectFiles().filter(file => /\.(ts|mjs|vue|css|md|json|yaml|yml|html|sh|sql|csv|txt|svg)$|^\.ci\/|^\.gitignore$/.test(file))
const code = written.filter(file => /\.(ts|mjs|vue|css)$/.test(file))
const generated = /^package-lock\.json$|\/migrations\/meta\//

// Written in two parts so that this file does not hold what it looks for.
const forbidden: [string, RegExp][] = [
  ['a path of one machine', new RegExp(['/wo' + 'rk/', '/tmp/' + 'wt', '/ro' + 'ot/', '/ho' + 'me/'].join('|'))],
  ['a conflict marker', new RegExp(`^(${'<'.repeat(7)}|${'>'.repeat(7)}) `, 'm')],
  ['an address to fetch from at run time', new RegExp('https?://(' + ['fonts\\.googleapis', 'unpkg', 'cdn\\.jsdelivr', 'cdnjs\\.cloudflare'].join('|') + ')')],
]

describe('every file', () => {
  it.each(forbidden)('is free of %s', (_, pattern) => {
    expect(written.filter(file => !generated.test(file) && pattern.test(textOf(file)))).toEqual([])
  })

  it(`has at most ${mostLines} lines of code`, () => {
    expect(code.filter(file => textOf(file).split('\n').length > mostLines + 1)).toEqual([])
  })

  it(`past ${mostLinesWithoutReason} lines says why in its first line`, () => {
    const long = code.filter(file => textOf(file).split('\n').length > mostLinesWithoutReason + 1)
    expect(long.filter(file => !/^(\/\/|\/\*|<!--)/.test(textOf(file)))).toEqual([])
  })

  it('that tests leaves no test out', () => {
    const left = /\b(?:it|test|describe)\.(?:skip|todo|only|fixme)\b/
    expect(written.filter(file => /^tests\/.*\.ts$/.test(file) && left.test(textOf(file)))).toEqual([])
  })
})

describe('the lock file', () => {
  it('records no download address, so that each machine uses its own registry', () => {
    const lock = textOf('package-lock.json')
    expect(lock).toContain('"node_modules/nuxt"')
    expect(lock).not.toContain('"resolved"')
  })
})
