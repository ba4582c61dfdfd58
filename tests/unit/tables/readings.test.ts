import { describe, expect, it } from 'vitest'
import type { FoundReading } from '#shared/tables/types'
import { understand } from '#shared/tables/understand'
import { noContext, problemsOf, readingsOf, rowOf, sheet, understandFile, understandText } from './table'

const curve = (readings: readonly FoundReading[]) => readings.map(({ salt, x, y }) => [salt, x, y])
const spreads = (readings: readonly FoundReading[]) => readings.map(({ sd, sdGiven, sdMeaning, n }) => ({ sd, sdGiven, sdMeaning, n }))

describe('readings', () => {
  it('are the very doubles of their digits, blanks without a salt', () => {
    expect(curve(readingsOf(understandFile('plain.csv')))).toEqual([[null, 0, 31.02], ['NaSCN', 0.05, 31.56], ['NaSCN', 0.1, 31.8], ['Na2SO4', 0.05, 29.9], ['Na2SO4', 0.1, 28.75]])
  })

  it('come from the columns of a wide table, one blank for all of them, limits as limits', () => {
    const readings = readingsOf(understandFile('wide-salts.csv'))
    expect(curve(readings)).toEqual([
      [null, 0, 31], ['NaCl', 0.05, 30.4], ['Na2SO4', 0.05, 28.1], ['NaSCN', 0.05, 31.6], ['NaCl', 0.1, 29.9], ['Na2SO4', 0.1, 25.8], ['NaSCN', 0.1, 31.9], ['Na2SO4', 0.2, 4], ['NaSCN', 0.2, 31.8],
    ])
    expect(readings.filter(({ limit }) => limit === 'below')).toHaveLength(1)
  })

  it('keep several blanks of a wide row that differ', () => {
    expect(curve(readingsOf(understandText('c (M)\tNaCl\tNaSCN\n0\t31.0\t31.1\n0.1\t30.4\t31.6\n'))).slice(0, 2)).toEqual([[null, 0, 31], [null, 0, 31.1]])
  })

  it('are the mean of repeats side by side, with their number and spread', () => {
    const readings = readingsOf(understandFile('NaSCN-repeats.txt'))
    expect(readings.map(({ y }) => y)).toEqual([31.1, 31.65, 31.933])
    expect(spreads(readings)[0]).toEqual({ sd: expect.closeTo(0.1 / Math.sqrt(3), 10), sdGiven: 0.1, sdMeaning: 'sd-of-replicates', n: 3 })
    expect(spreads(readings)[1]).toMatchObject({ n: 2 })
  })

  it('take both branches of a ramp with their directions and uncertainties', () => {
    const readings = readingsOf(understandFile('branches.csv'))
    expect(readings.map(({ direction, y, sd }) => [direction, y, sd])).toEqual([
      ['heating', 31, 0.1], ['cooling', 30.6, 0.1], ['heating', 30.4, 0.1], ['cooling', 30, 0.2], ['heating', 29.9, 0.15],
    ])
  })

  it('read salt and uncertainty from a head of two rows', () => {
    expect(readingsOf(understandFile('wide-groups.csv')).map(({ salt, y, sdGiven }) => [salt, y, sdGiven])).toEqual([
      [null, 31, 0.1], ['NaCl', 30.4, 0.1], ['NaSCN', 31.6, 0.2], ['NaCl', 29.9, 0.1], ['NaSCN', 31.9, 0.1],
    ])
  })

  it('belong to the salt that a row above them names', () => {
    expect(curve(readingsOf(understandFile('sections.csv')))).toEqual([['NaCl', 0.1, 30], ['NaCl', 0.2, 28.95], ['Na2SO4', 0.1, 27.05], ['Na2SO4', 0.2, 25.06]])
  })

  it('keep a standard deviation as given where no number of samples is told, and give it no weight', () => {
    const understood = understandText('salt\tc (M)\tT (°C)\tsd\nNaCl\t0.1\t30.4\t0.3\n')
    expect(spreads(readingsOf(understood))).toEqual([{ sd: null, sdGiven: 0.3, sdMeaning: 'sd-of-replicates', n: null }])
    expect(understood.remarks.join()).toContain('how many samples')
  })

  it('carry what else a row says', () => {
    const text = 'salt\tc (M)\tT (°C)\tn\tdirection\trate (K/min)\tpH\tbatch\tdate\tnote\nNaCl\t0.1\t30.4\t3\tcooling\t0.5\t7.2\tB2\t04.03.2026\tslow\n'
    expect(readingsOf(understandText(text))).toEqual([expect.objectContaining({ n: 3, direction: 'cooling', rate: 0.5, ph: 7.2, batch: 'B2', date: '2026-03-04', note: 'slow', scale: 'mol/L' })])
  })

  it('follow the unit of their cells where the column states none', () => {
    expect(readingsOf(understandText('salt\tc\tT (°C)\nNaCl\t50 mmol/kg\t30.4\nNaCl\t0.1 mol/kg\t29.9\n')).map(({ x, scale }) => [x, scale])).toEqual([[0.05, 'mol/kg'], [0.1, 'mol/kg']])
  })

  it('take an uncertainty without a unit for one in the unit of its temperatures', () => {
    expect(readingsOf(understandText('salt\tc (M)\tT (°F)\tu\nNaCl\t0.1\t86\t0.9\n'))[0]).toMatchObject({ y: 30, sd: 0.5 })
    expect(readingsOf(understandText('salt\tc (M)\tT (°F)\tu (K)\nNaCl\t0.1\t86\t0.9\n'))[0]).toMatchObject({ y: 30, sd: 0.9 })
    expect(readingsOf(understandText('salt\tc (M)\tT (K)\tu\nNaCl\t0.1\t303.15\t0.9\n'))[0]).toMatchObject({ y: 30, sd: 0.9 })
  })

  it('are limits where a column or the cell itself says so', () => {
    const text = 'salt\tc (M)\tT (°C)\tlimit\nNaCl\t0.1\t4\tbelow\nNaCl\t0.2\t<4\texact\nNaCl\t0.3\t20\tsalt-precipitated\nNaCl\t0.4\t20.5\t\n'
    expect(readingsOf(understandText(text)).map(({ limit }) => limit)).toEqual(['below', 'below', 'salt-precipitated', 'exact'])
  })

  it('stay on the scale they were made up on', () => {
    expect(readingsOf(understandText('salt\tb (mmol/kg)\tT (°C)\nNaCl\t50\t30.4\n'))).toEqual([expect.objectContaining({ x: 0.05, scale: 'mol/kg' })])
  })

  it('come back from an export as they went out, digit for digit and without a question', () => {
    const { questions, rows } = understandFile('exported.csv')
    expect(questions).toEqual([])
    const readings = rows.flatMap(row => row.readings)
    expect(readings.map(({ salt, x, y, sd, n, limit, setAside, note, batch, ph }) => [salt, x, y, sd, n, limit, setAside, note, batch, ph])).toEqual([
      [null, 0, 31.02, 0.017320508075688773, 3, 'exact', null, null, '4 March', null],
      [null, 0, 31.02, 0.017320508075688773, 3, 'exact', null, null, '4 March', null],
      ['NaSCN', 0.05, 31.560000000000002, null, 3, 'exact', null, null, '4 March', null],
      ['NaSCN', 0.1, 31.8, 0.02, 3, 'exact', 'bubble in the cell, seen by eye', '=not a formula', '4 March', 7.2],
      ['Na2SO4', 1.5, 4, 0.02, null, 'below', null, null, '5 March', null],
      ['Na2SO4', 2, 318.6, 0.02, null, 'exact', 'typed wrong', null, '5 March', null],
    ])
  })
})

describe('columns that say nearly the same', () => {
  const meanings = (text: string) => understandText(text).columns.map(({ meaning }) => meaning)

  it('are not averaged: one temperature in two units', () => {
    const understood = understandText('salt\tc (M)\tT (°C)\tT (K)\nNaCl\t0.1\t30.40\t303.55\n')
    expect(readingsOf(understood)).toEqual([expect.objectContaining({ y: 30.4, n: null })])
    expect(understood.remarks.join()).toContain('“T (K)” stays with the file')
  })

  it('keep amounts apart from names, ionic strength from concentration, percent from kelvin', () => {
    expect(meanings('Salt added (g)\tSalt\tionic strength (M)\tc (M)\tT (°C)\tu (%)\n0.58\tNaCl\t0.1\t0.1\t30.4\t1\n')).toEqual(['kept', 'salt', 'kept', 'concentration', 'cloud-point', 'kept'])
  })

  it('find the cloud point of a polymer, not its amount', () => {
    expect(meanings('polymer (mg/mL)\tsalt\tc (M)\tcloud point of 1 mg/mL PNIPAM (°C)\n1\tNaCl\t0.1\t30.4\n')).toEqual(['kept', 'salt', 'concentration', 'cloud-point'])
  })

  it('are guessed from their numbers where there is no header, in either order', () => {
    expect(meanings('31.2 0.1\n31.4 0.2\n31.5 0.3\n')).toEqual(['cloud-point', 'concentration'])
    expect(meanings('0.1 31.2 0.05\n0.2 31.4 0.05\n')).toEqual(['concentration', 'cloud-point', 'uncertainty'])
  })
})

describe('a row at concentration 0', () => {
  it('is a blank, whatever its solution is called', () => {
    expect(curve(readingsOf(understandText('salt\tc (M)\tT (°C)\ncontrol\t0\t31\nblank\t-\t31.1\nNaCl\t0\t31.2\n')))).toEqual([[null, 0, 31], [null, 0, 31.1], [null, 0, 31.2]])
  })
})

describe('words behind the last heading', () => {
  it('are a note', () => {
    const understood = understandText('salt,c (M),T (°C)\nNaCl,0.1,30.4,slow ramp\nNaCl,0.2,29.9\n')
    expect(readingsOf(understood).map(({ note }) => note)).toEqual(['slow ramp', null])
    expect(problemsOf(understood)).toEqual([])
  })

  it('are not, where numbers stand there: cells may have slipped', () => {
    expect(problemsOf(understandText('salt,c (M),T (°C)\nNaCl,0,1,30.4\nNaCl,0.2,29.9\n'))).toEqual(['2 decide ragged'])
  })

  it('and numbers, too, stay with the file where columns cannot slip', () => {
    expect(problemsOf(understandText('salt\tc (M)\tT (°C)\nNaCl\t0.1\t30.4\t17\nNaCl\t0.2\t29.9\n'))).toEqual([])
  })
})

describe('a sheet', () => {
  const head = ['salt', 'conc (M)', 'T (°C)', 'date', 'note']

  it('gives its numbers as it keeps them', () => {
    const understood = understand(sheet([head, ['NaCl', 0.1, 30.400000000000002], ['NaCl', 0.2, 29.9]]), {}, noContext)
    expect(curve(readingsOf(understood))).toEqual([['NaCl', 0.1, 30.400000000000002], ['NaCl', 0.2, 29.9]])
  })

  it('says which numbers are stored as text, and reads them', () => {
    const understood = understand(sheet([head, ['NaCl', '0.1', 30.4], ['NaCl', 0.2, 29.9]]), {}, noContext)
    expect(problemsOf(understood)).toEqual(['2 taken text-number'])
    expect(readingsOf(understood)).toHaveLength(2)
  })

  it('gives the kept value of a formula and says so once; one without a value cannot be read', () => {
    const understood = understand(sheet([head, ['NaCl', { text: '0.1', value: 0.1, formula: 'A1/2' }, 30.4], ['NaCl', { text: '', formula: 'A1/2' }, 29.9]]), {}, noContext)
    expect(understood.remarks.join()).toContain('2 cells hold formulas')
    expect(problemsOf(understood)).toEqual(['3 fault formula'])
  })

  it('knows a mean by its formula', () => {
    const understood = understand(sheet([head, ['NaCl', 0.1, 30.4], ['', '', { text: '30.4', value: 30.4, formula: 'AVERAGE(C2:C2)' }]]), {}, noContext)
    expect(problemsOf(understood)).toEqual(['3 kept summary-row'])
  })

  it('reads hidden rows and merged cells, and says so', () => {
    const grid = sheet([head, ['NaCl', 0.1, 30.4], [{ text: 'NaCl', isMerged: true }, 0.2, 29.9]])
    const hidden = { ...grid, rows: grid.rows.map((row, index) => ({ ...row, isHidden: index === 1 })) }
    const understood = understand(hidden, {}, noContext)
    expect(problemsOf(understood)).toEqual(['2 taken hidden-row', '3 taken merged'])
    expect(understood.counts.ready).toBe(2)
    expect(understood.remarks).toHaveLength(2)
  })

  it('asks about a number that became a date, takes days for dates', () => {
    const understood = understand(sheet([head, ['NaCl', 0.1, { text: '2026-03-31', value: 46112, isDate: true }, { text: '2026-03-04', value: 46085, isDate: true }], ['NaCl', 0.2, 30.92, 46085]]), {}, noContext)
    expect(rowOf(understood, 2).problems).toEqual([expect.objectContaining({ code: 'date-number', tone: 'decide', suggestion: '31.03' })])
    expect(readingsOf(understood)).toEqual([expect.objectContaining({ date: '2026-03-04' })])
  })
})
