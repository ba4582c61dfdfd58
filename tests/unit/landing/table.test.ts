import { describe, expect, it } from 'vitest'
import { readTable } from '~~/composables/sheet/table'

describe('readTable', () => {
  it.each([
    ['tabs', '0.02\t31.27\n0.05\t31.56'],
    ['semicolons', '0.02;31.27\n0.05;31.56'],
    ['commas', '0.02,31.27\n0.05,31.56'],
    ['spaces', '0.02  31.27\n0.05 31.56'],
    ['carriage returns', '0.02\t31.27\r\n0.05\t31.56\r\n'],
    ['quotes', '"0.02","31.27"\n"0.05","31.56"'],
  ])('cuts lines at %s', (_, text) => {
    expect(readTable(text).rows).toEqual([['0.02', '31.27'], ['0.05', '31.56']])
  })

  it.each([
    ['tabs', '0,02\t31,27'], ['semicolons', '0,02;31,27'], ['spaces', '0,02 31,27'], ['commas', '0,02,31,27'],
  ])('keeps decimal commas between %s', (_, text) => {
    expect(readTable(text).rows).toEqual([['0,02', '31,27']])
  })

  it('leaves out a title and a line of units, and counts them', () => {
    const table = readTable('[NaSCN]\tT\nmol/L\t°C\n0\t31')
    expect(table).toEqual({ rows: [['0', '31']], headLines: 2, isMillimolar: false })
  })

  it('notices a head that counts in mmol/L', () => {
    expect(readTable('c / mM;T\n20;31,3').isMillimolar).toBe(true)
  })

  it('keeps a cell that is no number below the head', () => {
    expect(readTable('0.8\t30,8l').rows).toEqual([['0.8', '30,8l']])
  })

  it('keeps the empty cell of a row', () => {
    expect(readTable('0.1\t\t0.03\n0.2\t31\t0.03').rows[0]).toEqual(['0.1', '', '0.03'])
  })

  it('gives nothing for nothing', () => {
    expect(readTable(' \n ').rows).toEqual([])
  })
})
