import { describe, expect, it } from 'vitest'
import type { Decision, TableChoices } from '#shared/tables/types'
import { readingsOf, rowOf, understandFile, understandText } from './table'

const decide = (...decisions: Partial<Decision>[]): TableChoices => ({ decisions: decisions.map(decision => ({ row: 1, column: null, action: 'agree', ...decision })) })
const labBook = (...decisions: Partial<Decision>[]) => understandFile('lab-book.tsv', decide(...decisions))

const salt = { row: 11, column: 1 }
const point = { row: 12, column: 2 }

describe('a decision', () => {
  it('that agrees puts the suggestion into its cell', () => {
    const row = rowOf(labBook({ ...salt, action: 'agree' }), 11)
    expect(row).toMatchObject({ state: 'ready', problems: [], cells: ['0.35', 'NaSCN', '31.97', '31.60', '0.03', '05.03.31', ''] })
    expect(row.readings[0]).toMatchObject({ salt: 'NaSCN', x: 0.35 })
  })

  it.each([['-50 mM', 0.05], ['-0.05', 0.05], ['50', 0.05]])('that agrees never changes the unit: %s', (text, x) => {
    const understood = understandText(`salt\tc (M)\tT (°C)\nNaCl\t${text}\t30.4\nNaCl\t0.2\t29.9\n`, decide({ row: 2, column: 1 }))
    expect(rowOf(understood, 2).readings).toEqual([expect.objectContaining({ x })])
  })

  it('that agrees gives °C in a column of kelvin', () => {
    const understood = understandText('salt\tc (M)\tT (K)\nNaCl\t0.1\t318.6 °C\nNaCl\t0.2\t303.15\nNaCl\t0.3\t31.2\n', decide({ row: 2, column: 2 }, { row: 4, column: 2 }))
    expect(readingsOf(understood).map(({ y }) => y)).toEqual([31.86, 30, 31.2])
  })

  it('that agrees to what was taken ends the matter', () => {
    expect(rowOf(labBook({ row: 4, column: 0 }), 4)).toMatchObject({ state: 'ready', problems: [], readings: [{ x: 0.05 }, { x: 0.05 }] })
    expect(rowOf(labBook({ row: 14, column: 4 }), 14)).toMatchObject({ problems: [], readings: [{ sd: 0.03, sdGiven: null }, { sd: 0.03 }] })
  })

  it('that corrects is read like any cell, right or wrong', () => {
    expect(rowOf(labBook({ ...point, action: 'correct', value: '31,88' }), 12)).toMatchObject({ state: 'ready', readings: [{ y: 31.88 }, { y: 31.51 }] })
    expect(rowOf(labBook({ ...point, action: 'correct', value: 'about right' }), 12)).toMatchObject({ state: 'unreadable', problems: [{ code: 'not-a-number', message: expect.stringContaining('about right') }] })
  })

  it('sets a whole row aside with its reason, an impossible temperature, too', () => {
    expect(rowOf(labBook({ row: 12, action: 'set-aside', value: 'typed wrong' }), 12)).toMatchObject({ state: 'ready', readings: [{ y: 318.6, setAside: 'typed wrong' }, { y: 31.51, setAside: 'typed wrong' }] })
  })

  it('sets one of two cloud points aside', () => {
    expect(rowOf(labBook({ ...point, action: 'set-aside', value: 'typed wrong' }), 12).readings.map(({ setAside }) => setAside)).toEqual(['typed wrong', null])
  })

  it('sets aside with the file what holds no number', () => {
    const understood = understandText('salt\tc (M)\tT (°C)\nNaCl\t0.1\tspilled\nNaCl\t0.2\t29.9\n', decide({ row: 2, action: 'set-aside', value: 'spilled' }))
    expect(rowOf(understood, 2)).toMatchObject({ state: 'kept', readings: [], problems: [{ code: 'left-out' }] })
  })

  it('leaves a row or a cell out', () => {
    expect(rowOf(labBook({ row: 12, action: 'leave-out' }), 12)).toMatchObject({ state: 'kept', problems: [{ code: 'left-out', tone: 'kept' }] })
    expect(rowOf(labBook({ ...point, action: 'leave-out' }), 12)).toMatchObject({ state: 'ready', readings: [{ y: 31.51 }] })
  })

  it('makes one reading of the same row twice, or keeps both', () => {
    expect(rowOf(labBook({ row: 15 }), 15)).toMatchObject({ state: 'kept', readings: [], problems: [{ code: 'same-row', tone: 'kept' }] })
    expect(rowOf(labBook({ row: 15, action: 'keep-both' }), 15)).toMatchObject({ state: 'ready', problems: [] })
  })

  it('of the newest word holds, and a word can be taken back', () => {
    expect(rowOf(labBook({ ...salt, action: 'correct', value: 'NaCl' }, { ...salt, action: 'correct', value: 'NaBr' }), 11).readings[0]).toMatchObject({ salt: 'NaBr' })
    expect(rowOf(labBook({ ...salt }, { ...salt, action: 'reopen' }), 11)).toMatchObject({ state: 'to-decide', cells: expect.arrayContaining(['NaSNC']) })
    expect(rowOf(labBook({ ...salt }, { row: 11, action: 'reopen' }), 11).state).toBe('to-decide')
  })

  it('agrees to the suggestion on a correction, not to the one before it', () => {
    expect(rowOf(labBook({ ...salt, action: 'correct', value: 'NaBrx' }, salt), 11).readings[0]).toMatchObject({ salt: 'NaBr' })
  })

  it('about a comma never decides about being the same as another row', () => {
    const text = 'salt\tc (M)\tT (°C)\nNaCl\t0.1\t30.4\nNaCl\t0,1\t30,4\nNaCl\t0.3\t29.3\n'
    expect(rowOf(understandText(text, decide({ row: 3, column: 1 })), 3)).toMatchObject({ state: 'to-decide', problems: [{ code: 'same-row' }] })
  })

  it('leads through all of an ugly table to nothing but ready and kept rows', () => {
    const { counts } = labBook(salt, point, { row: 15 })
    expect(counts).toEqual({ total: 16, ready: 14, toDecide: 0, unreadable: 0, kept: 2 })
  })

  it('is asked for where another header stands among the rows, so that no row is read under the wrong salt', () => {
    const text = 'c (M)\tNaCl\n0.1\t30.4\n\nc (M)\tNaSCN\n0.1\t31.6\n'
    expect(rowOf(understandText(text), 4)).toMatchObject({ state: 'to-decide', problems: [{ code: 'repeated-header', message: 'Another header' }] })
    expect(rowOf(understandText(text, decide({ row: 4 })), 4)).toMatchObject({ state: 'kept', problems: [{ tone: 'kept' }] })
    expect(understandText('c (M)\tNaCl\n0.1\t30.4\n\nsalt\tc (M)\tT (°C)\tu (K)\nNaBr\t0.1\t30.8\t0.1\n')).toMatchObject({ headerRow: 1, counts: { toDecide: 1 } })
    const nearlyTheSame = 'c (M)\tNaCl\tNaBr\tn\tnote\n0.1\t30.4\t30.8\t3\t\nc (M)\tNaSCN\tNaBr\tn\tnote\n0.1\t31.6\t30.8\t3\t\n'
    expect(rowOf(understandText(nearlyTheSame), 3).state).toBe('to-decide')
  })

  it('about a cell that is not there changes nothing', () => {
    expect(labBook({ row: 4, column: 90_000, action: 'correct', value: '1' }).rows).toEqual(labBook().rows)
  })

  it('never changes how many rows there are', () => {
    const actions = ['agree', 'correct', 'leave-out', 'set-aside', 'keep-both', 'reopen'] as const
    for (const action of actions) {
      for (const column of [null, 0, 1, 2]) {
        const decisions = Array.from({ length: 17 }, (_, index): Decision => ({ row: index + 1, column, action, value: 'x' }))
        expect(understandFile('lab-book.tsv', { decisions }).counts.total).toBe(16)
      }
    }
  })
})

describe('findings that rows share', () => {
  it('are one group: the commas of rows 7 to 10', () => {
    const grouped = understandFile('lab-book.tsv').rows.flatMap(row => row.problems).filter(({ group }) => group?.startsWith('decimal-comma'))
    expect(grouped.map(({ row }) => row)).toEqual([7, 8, 9, 10])
    expect(new Set(grouped.map(({ group }) => group)).size).toBe(1)
    expect(grouped[0]).toMatchObject({ message: 'Decimal commas', detail: 'Rows 7 to 10 use commas. Read as 0.16, 31.98 and so on.', columns: [0, 2, 3, 4] })
  })

  it('are told apart where they say different things', () => {
    const groups = understandFile('filled-down.csv').rows.flatMap(row => row.problems).map(({ group }) => group)
    expect(groups[0]).toBe(groups[1])
    expect(groups[2]).not.toBe(groups[0])
  })
})

describe('a filled-in uncertainty', () => {
  it('is the median of its series and marked by having been given none', () => {
    expect(rowOf(understandFile('lab-book.tsv'), 14).readings[0]).toMatchObject({ sd: 0.03, sdGiven: null, sdMeaning: null })
    expect(readingsOf(understandFile('lab-book.tsv')).filter(({ sd, sdGiven }) => sd !== null && sdGiven === null)).toHaveLength(2)
  })

  it('is not made up where most of the series has none', () => {
    const understood = understandText('salt\tc (M)\tT (°C)\tu (K)\nNaCl\t0.1\t30.4\t0.1\nNaCl\t0.2\t29.9\t\nNaCl\t0.3\t29.3\t\n')
    expect(readingsOf(understood).map(({ sd }) => sd)).toEqual([0.1, null, null])
  })
})
