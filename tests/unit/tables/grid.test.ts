import { describe, expect, it } from 'vitest'
import { gridOfText } from '#shared/tables/grid'
import { mostColumns, mostRows } from '#shared/tables/types'

const cellsOf = (text: string, choices = {}) => gridOfText(text, {}, choices).rows.map(({ cells }) => cells.map(cell => cell.text))
const encoded = (text: string) => new TextEncoder().encode(text)
const lines = (count: number) => `salt,c (M),T (°C)\n${'NaCl,0.1,30.4\n'.repeat(count)}`

describe('gridOfText', () => {
  it.each([
    ['commas', 'a,b\n1,2\n', ','],
    ['semicolons beside decimal commas', 'a;b\n1,5;2,5\n', ';'],
    ['tabs beside decimal commas', 'a\tb\n1,5\t2,5\n', '\t'],
    ['bars', 'a|b\n1|2\n', '|'],
    ['single spaces', 'a b\n1 2\n', 'space'],
    ['spaces beside decimal commas', 'c T u\n0,05 31,2 0,1\n0,10 31,4 0,1\n', 'space'],
  ])('recognises %s', (_, text, delimiter) => {
    expect(gridOfText(text, {}, {}).delimiter).toBe(delimiter)
  })

  it('keeps single spaces inside cells that wider gaps part', () => {
    expect(cellsOf('salt name   conc\nsodium chloride   0.1\npotassium bromide   0.2\n')).toEqual([['salt name', 'conc'], ['sodium chloride', '0.1'], ['potassium bromide', '0.2']])
  })

  it('keeps a unit or an uncertainty with its number where spaces part the cells', () => {
    expect(cellsOf('c T\n50 mM 31.2 ± 0.1\n')).toEqual([['c', 'T'], ['50 mM', '31.2 ± 0.1']])
  })

  it('follows the delimiter that a person chooses', () => {
    expect(cellsOf('a;b,c\n1;2,3\n', { delimiter: ';' })).toEqual([['a', 'b,c'], ['1', '2,3']])
  })

  it('joins numbers that a comma cut in two where one way alone fits the head', () => {
    expect(cellsOf('salt,c,T\nNaCl,0,05,30,6\nNaCl,0,10,30,2\nblank,0,31,0\n')).toEqual([
      ['salt', 'c', 'T'], ['NaCl', '0,05', '30,6'], ['NaCl', '0,10', '30,2'], ['blank', '0', '31', '0'],
    ])
  })

  it('numbers rows as the file does: empty ones count, a quoted line end does not', () => {
    const { rows } = gridOfText('a,b\n\n"1\n2",3\n4,5\n', {}, {})
    expect(rows.map(({ number }) => number)).toEqual([1, 3, 4])
  })

  it('takes a quote that is never closed for a letter, and so loses no row', () => {
    expect(cellsOf('a,b\n"1,2\n3,4\n')).toEqual([['a', 'b'], ['"1', '2'], ['3', '4']])
  })

  it('takes a table of the most rows and refuses a longer one', () => {
    expect(gridOfText(lines(mostRows), {}, {}).rows).toHaveLength(mostRows + 1)
    expect(() => gridOfText(lines(mostRows + 2), {}, {})).toThrowError(expect.objectContaining({ code: 'too-many-rows', message: expect.stringContaining('50,000 rows') }))
    expect(() => gridOfText(lines(mostRows + 2).replaceAll('NaCl', '"NaCl"'), {}, {})).toThrowError(expect.objectContaining({ code: 'too-many-rows' }))
  })

  it('does not count the empty rows that spreadsheets write', () => {
    expect(gridOfText(`a;b\n1;2\n${';\n'.repeat(mostRows + 10)}`, {}, {}).rows).toHaveLength(2)
  })

  it('refuses more columns than the most and does not count empty ones', () => {
    const wide = (count: number) => `${Array.from({ length: count }, (_, index) => `c${index}`).join(',')}\n`
    expect(() => gridOfText(wide(mostColumns + 1), {}, {})).toThrowError(expect.objectContaining({ code: 'too-many-columns' }))
    expect(gridOfText(`${wide(mostColumns).trim()}${','.repeat(50)}\n`, {}, {}).rows).toHaveLength(1)
  })

  it('follows the encoding that a person chooses, and says when the bytes cannot be it', () => {
    const latin = Uint8Array.from([...'a;b\nä;1\n'].map(letter => letter.charCodeAt(0)))
    expect(gridOfText(latin, {}, { encoding: 'windows-1252' }).rows[1]?.cells[0]?.text).toBe('ä')
    expect(() => gridOfText(latin, {}, { encoding: 'utf-8' })).toThrowError(expect.objectContaining({ code: 'wrong-encoding', message: expect.stringContaining('UTF-8') }))
  })

  it('says of a paste that it is one', () => {
    expect(gridOfText('a\tb\n1\t2', { isPaste: true }, {})).toMatchObject({ format: 'paste', encoding: null, delimiter: '\t' })
    expect(gridOfText(encoded('a\tb\n1\t2'), { name: 'x.txt' }, {})).toMatchObject({ format: 'tsv', encoding: 'utf-8' })
  })
})
