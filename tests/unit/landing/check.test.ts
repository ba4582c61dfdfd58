import { describe, expect, it } from 'vitest'
import { checkSheet, emptyRow, type SheetRow } from '~~/composables/sheet/check'

function rows(...cells: [string, string, string?][]): SheetRow[] {
  return cells.map(([x, y, sd = '']) => ({ ...emptyRow(), x, y, sd }))
}

describe('checkSheet', () => {
  it('reads the rows that are complete and keeps their place in the sheet', () => {
    const { readings, problems } = checkSheet(rows(['0', '31'], ['', ''], ['0,1', '31,4']), false)
    expect(readings).toEqual([{ number: 1, x: 0, y: 31 }, { number: 3, x: 0.1, y: 31.4 }])
    expect(problems).toEqual([])
  })

  it('names the row of a cell that is no number and offers what was meant', () => {
    const { problems, gaps, filled } = checkSheet(rows(['0', '31'], ['0.8', '30,8l']), false)
    expect(problems).toEqual([{ row: 2, column: 'y', finding: 'Row 2: “30,8l” is not a number.', suggestion: '30.81' }])
    expect(gaps).toEqual([{ x: 0.8, row: 2 }])
    expect(filled).toBe(2)
  })

  it('reports every problem of a row at once', () => {
    expect(checkSheet(rows(['-1', 'abc', '-0.1']), true).problems.map(problem => problem.column)).toEqual(['x', 'y', 'sd'])
  })

  it('offers a decimal point where one is missing', () => {
    expect(checkSheet(rows(['0', '3181']), false).problems[0]?.suggestion).toBe('31.81')
  })

  it('takes a column of kelvin for kelvin, and one such value for a slip', () => {
    const { problems } = checkSheet(rows(['0', '304.1'], ['50', '304.7']), false)
    expect(problems.map(({ suggestion }) => suggestion)).toEqual(['30.95', '31.55'])
    expect(problems[0]?.finding).toContain('looks like kelvin')
    expect(checkSheet(rows(['0', '31.2'], ['0.1', '318.6']), false).problems[0]?.suggestion).toBe('31.86')
  })

  it('waits for a row that is not finished', () => {
    const { readings, problems } = checkSheet(rows(['0.3', ''], ['', '31']), false)
    expect([readings, problems]).toEqual([[], []])
  })

  it('takes the standard uncertainty only when its column is shown', () => {
    expect(checkSheet(rows(['0', '31', '0.05']), true).readings[0]).toEqual({ number: 1, x: 0, y: 31, sd: 0.05 })
    expect(checkSheet(rows(['0', '31', 'abc']), false).readings[0]).toEqual({ number: 1, x: 0, y: 31 })
  })
})
