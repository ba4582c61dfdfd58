import { describe, expect, it } from 'vitest'
import { readdirSync } from 'node:fs'
import { join } from 'node:path'
import { gridOfText } from '#shared/tables/grid'
import { TableError } from '#shared/tables/types'
import { root } from '../house/sources'
import { refusedFiles, understoodFiles } from './expected-files'
import { bytesOf, problemsOf, questionsOf, readingsOf, understandFile } from './table'

describe('a file of a lab', () => {
  it('has an answer here, each of them', () => {
    const listed = [...refusedFiles, ...understoodFiles].map(({ file }) => file).sort()
    expect(readdirSync(join(root, 'tests/fixtures/tables')).filter(file => /\.(csv|tsv|txt)$|-renamed/.test(file)).sort()).toEqual(listed)
  })

  it.each(refusedFiles)('$file is refused as $code, with what to do instead', ({ file, code }) => {
    let refusal: unknown
    try {
      understandFile(file)
    }
    catch (error) {
      refusal = error
    }
    expect(refusal).toBeInstanceOf(TableError)
    expect(refusal).toMatchObject({ code, message: expect.stringMatching(/^(?:This|The) .+\. [A-Z].+\.$/) })
  })

  it.each(understoodFiles)('$file is understood, every row accounted for', (expected) => {
    const found = understandFile(expected.file)
    const { total, ready, toDecide, unreadable, kept } = found.counts
    expect({
      cut: `${found.format} ${found.encoding} ${found.decimal}`, form: found.form, head: [found.headerRow, found.unitsRow],
      counts: [total, ready, toDecide, unreadable, kept],
      columns: found.columns.map(({ meaning, unit, direction, salt }) => [meaning, unit, direction, salt].filter(Boolean).join(' ')).join(', '),
      problems: problemsOf(found), questions: questionsOf(found),
    }).toEqual({
      cut: expected.cut, form: expected.form, head: expected.head, counts: expected.counts, columns: expected.columns,
      problems: expected.problems ?? [], questions: expected.questions ?? [],
    })
    expect(ready + toDecide + unreadable + kept).toBe(total)
  })

  it.each(['utf-8-bom.csv', 'utf-16le-bom.csv', 'utf-16be-bom.csv', 'utf-16le.csv', 'utf-16be.csv', 'cr-only.csv', 'mixed-line-ends.csv'])('%s gives the readings of plain.csv', (file) => {
    expect(readingsOf(understandFile(file))).toEqual(readingsOf(understandFile('plain.csv')))
  })

  it('keeps the characters that Windows has and Latin-1 has not', () => {
    expect(readingsOf(understandFile('windows-1252.csv')).map(({ note }) => note)).toContain('Messung wiederholt – Blase?')
  })

  it('keeps line ends, delimiters and doubled quotes inside quoted cells', () => {
    expect(readingsOf(understandFile('quoted-newlines.csv')).map(({ note }) => note)).toEqual(['first line\nsecond "line", and more', 'one, two', 'a "word" in quotes'])
  })

  it('takes the name that ends wrongly for what the bytes say', () => {
    expect(gridOfText(bytesOf('utf-16le.csv'), { name: 'table.xlsx' }, {}).rows).toHaveLength(6)
  })
})
