import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { gridOfText } from '#shared/tables/grid'
import { TableError, type TableChoices } from '#shared/tables/types'
import { understand } from '#shared/tables/understand'
import { understoodFiles } from './expected-files'
import { bytesOf, noContext } from './table'

const seed = 20260304
const runs = 1_000
/** Not a demand: a busy machine may take its time. */
const patience = 60_000

const files = understoodFiles.map(({ file }) => file)
const nasty = ['\u0000', '"', '""', '\r', '\n', '\t', ';', ',', '±', '=1+1', '@', '\uFEFF', '−5', '1e999', '9'.repeat(400), '(', 'NaCl', 'mean', 'K', '°C', '-', '\uD800', 'n.d.', '31.2(1)', '4.3.2026', ' ']

/** One way to spoil a file: cut it, shuffle or double its lines, put something into it. */
type Damage = (text: string, at: number, what: string) => string
const damages: Record<string, Damage> = {
  cutEnd: (text, at) => text.slice(0, Math.floor(text.length * at)),
  cutStart: (text, at) => text.slice(Math.floor(text.length * at)),
  insert: (text, at, what) => text.slice(0, Math.floor(text.length * at)) + what + text.slice(Math.floor(text.length * at)),
  drop: (text, at) => text.slice(0, Math.floor(text.length * at)) + text.slice(Math.floor(text.length * at) + 1),
  double: text => text + text,
  doubleLine: (text, at) => withLines(text, lines => lines.toSpliced(Math.floor(lines.length * at), 0, lines[Math.floor(lines.length * at)] ?? '')),
  turn: text => withLines(text, lines => lines.toReversed()),
  rotate: (text, at) => withLines(text, lines => [...lines.slice(Math.floor(lines.length * at)), ...lines.slice(0, Math.floor(lines.length * at))]),
  replaceAll: (text, at, what) => text.replaceAll(text[Math.floor(text.length * at)] ?? 'x', what.slice(0, 3)),
  repeatCell: (text, at, what) => withLines(text, lines => lines.map((line, index) => index === Math.floor(lines.length * at) ? line.replace(/[\d.]+/, what) : line)),
}
const withLines = (text: string, change: (lines: string[]) => string[]) => change(text.split('\n')).join('\n')

const damage = fc.record({ way: fc.constantFrom(...Object.keys(damages)), at: fc.double({ min: 0, max: 0.999, noNaN: true }), what: fc.constantFrom(...nasty) })
const decision = fc.record({
  row: fc.integer({ min: 1, max: 20 }), column: fc.option(fc.integer({ min: 0, max: 8 })), action: fc.constantFrom('agree', 'correct', 'leave-out', 'set-aside', 'keep-both', 'reopen' as const), value: fc.constantFrom(...nasty),
})
const choices: fc.Arbitrary<TableChoices> = fc.record({
  decimal: fc.constantFrom('.', ',' as const), headerRow: fc.integer({ min: 0, max: 6 }), unitsRow: fc.integer({ min: 0, max: 6 }), delimiter: fc.constantFrom(',', ';', '\t', '|', 'space' as const),
  columns: fc.array(fc.record({ index: fc.integer({ min: 0, max: 9 }), meaning: fc.constantFrom('concentration', 'salt', 'cloud-point', 'uncertainty', 'samples', 'date', 'kept' as const) }), { maxLength: 3 }),
  decisions: fc.array(decision, { maxLength: 6 }),
}, { requiredKeys: [] })

/** Every row of the grid below the header, and every one above it that is not head, comes back once and in one state. */
function expectAllAccountedFor(bytes: Uint8Array, chosen: TableChoices) {
  let grid, understood
  try {
    grid = gridOfText(bytes, {}, chosen)
    understood = understand(grid, chosen, noContext)
  }
  catch (error) {
    if (!(error instanceof TableError)) throw error
    return
  }
  const { counts, rows, headerRow, unitsRow } = understood
  const numbers = rows.map(({ row }) => row)
  expect(new Set(numbers).size).toBe(numbers.length)
  expect(counts.ready + counts.toDecide + counts.unreadable + counts.kept).toBe(counts.total)
  expect(counts.total).toBe(rows.length)
  const missing = grid.rows.map(({ number }) => number).filter(number => !numbers.includes(number))
  // Header, units and a row of salts above the header are head.
  expect(missing.every(number => number === headerRow || number === unitsRow || number === (headerRow ?? 0) - 1)).toBe(true)
  const isBlocked = understood.questions.some(question => question.isBlocking)
  for (const { state, readings, problems } of rows) {
    expect(readings.length > 0).toBe(state === 'ready')
    expect(state === 'ready' || problems.length > 0).toBe(true)
    for (const { x, y, sd, n } of readings) {
      expect(x >= 0 && Number.isFinite(x) && Number.isFinite(y)).toBe(true)
      expect(isBlocked || (y > -273.15 && y < 1000)).toBe(true)
      expect(sd === null || (sd >= 0 && Number.isFinite(sd))).toBe(true)
      expect(n === null || n >= 1).toBe(true)
    }
  }
}

/** Texts on which careless patterns and searches take for ever; each is as large as a file may be, or nearly. */
const hostile: Record<string, string> = {
  'a cell of quotes': `a,b\nx${'"'.repeat(4_000_000)},1\n`,
  'quotes that open and never close': `a,b\n${'"x,'.repeat(1_000_000)}\n`,
  'empty lines and a word': `${'\n'.repeat(8_000_000)}a,b\n1,2\n`,
  'a gap of spaces': `c T\n1${' '.repeat(8_000_000)}2\n`,
  'brackets and ±': `salt,c (M),T\nNaCl,0.1,${'(±'.repeat(500_000)}\nNaCl,0.2,30\n`,
  'digits in groups': `salt,c (M),T\nNaCl,0.1,${'1 '.repeat(1_000_000)}x\nNaCl,0.2,30\n`,
  'brackets in a heading': `salt,c (M),T ${'(['.repeat(500_000)}\nNaCl,0.2,30\n`,
  'a remark of many words': `${'cation anion '.repeat(200_000)}\nc (M),T\n0.2,30\n`,
  'digits that could be joined in many ways': `a${',a'.repeat(59)}\n${`${'1,'.repeat(80)}a,05\n`.repeat(50)}`,
}

describe('a hostile text', () => {
  it.each(Object.entries(hostile))('of %s is answered', (_, text) => {
    expectAllAccountedFor(new TextEncoder().encode(text), {})
  }, patience)
})

describe('a good file cut, shuffled, doubled and corrupted', () => {
  it('is refused in words or has every row accounted for', () => {
    fc.assert(fc.property(fc.constantFrom(...files), fc.array(damage, { minLength: 1, maxLength: 4 }), choices, fc.boolean(), (file, spoiled, chosen, isChosen) => {
      const latin = new TextDecoder('latin1')
      const text = spoiled.reduce((before, { way, at, what }) => damages[way]?.(before, at, what) ?? before, latin.decode(bytesOf(file)))
      expectAllAccountedFor(new TextEncoder().encode(text), isChosen ? chosen : {})
    }), { seed, numRuns: runs })
  }, patience)

  it('is so byte for byte, too', () => {
    fc.assert(fc.property(fc.constantFrom(...files), fc.array(fc.tuple(fc.nat(), fc.nat(255)), { minLength: 1, maxLength: 12 }), (file, changes) => {
      const bytes = bytesOf(file)
      for (const [place, byte] of changes) bytes[place % bytes.length] = byte
      expectAllAccountedFor(bytes, {})
    }), { seed, numRuns: runs })
  }, patience)
})
