import { describe, expect, it } from 'vitest'
import { attentionOf, findingsOf } from '#shared/science/pooling/findings'
import { acrossGroups, arrange, seriesTitle, shown } from '~~/components/project/overview/arrange'
import { sharedAxes } from '~~/components/project/overview/axes'
import { apartByCation } from '~~/components/project/overview/cations'
import { comparedOf } from '~~/components/project/overview/compared'
import { findingNote } from '~~/components/project/overview/findingNotes'
import { panelDrawing, remarkOf } from '~~/components/project/overview/panel'
import { railEntries } from '~~/components/project/overview/railEntries'
import { summaryLine } from '~~/components/project/overview/summary'
import { counted, listed } from '~~/components/project/overview/words'
import { demoSummaries } from '~~/tests/support/demoSummaries'

const series = demoSummaries()
const compared = series.map(comparedOf)
const findings = findingsOf(compared)
const attention = attentionOf(compared, findings)
const order = railEntries(series, 0.3).map(({ ion }) => ion)
const at = (lab: string, campaign: string, ion: string) =>
  series.find(one => one.campaign.lab.name === lab && one.campaign.name === campaign && one.salt.anion === ion)!

describe('railEntries', () => {
  it('ranks the demonstration from thiocyanate down to carbonate', () => {
    expect(order[0]).toBe('SCN^-')
    expect(order.slice(-2)).toEqual(['SO4^2-', 'CO3^2-'])
  })

  it('gives every value a whisker around it', () => {
    for (const { value, lower, upper } of railEntries(series, 0.3)) {
      expect(lower!).toBeLessThan(value!)
      expect(upper!).toBeGreaterThan(value!)
    }
  })
})

describe('arrange', () => {
  it('makes a row an anion in the order of the rail and a column a campaign, labs together', () => {
    const { rows, columns } = arrange(series, series, 'anion', order)
    expect(rows.map(row => row.ion)).toEqual(order)
    expect(columns.map(({ group, title }) => `${group} ${title}`)).toEqual([
      'Norrvik spring', 'Norrvik autumn', 'Ostrel spring', 'Ostrel autumn', 'Quaymere spring', 'Quaymere autumn',
    ])
    expect(columns.filter(column => column.isFirst)).toHaveLength(3)
  })

  it('makes a row a campaign and a column an anion on request', () => {
    const { rows, columns } = arrange(series, series, 'lab', order)
    expect(rows).toHaveLength(6)
    expect(columns.map(column => column.ion)[0]).toBe('CO3^2-')
  })

  it('keeps places and drops rows without anything to show', () => {
    const chosen = shown(series, 'to-look-at', attention)
    const { rows, columns } = arrange(series, chosen, 'anion', order)
    expect(rows.map(row => row.ion).sort()).toEqual(['I^-', 'NO3^-'])
    expect(columns).toHaveLength(6)
    expect(rows.flatMap(row => row.cells).filter(Boolean)).toHaveLength(3)
  })
})

describe('apartByCation', () => {
  const potassium = { ...at('Norrvik', 'spring', 'Cl^-'), id: 'potassium', salt: { formula: 'KCl', name: 'potassium chloride', anion: 'Cl^-', cation: 'K^+' } }

  it('leaves a project of one cation as it is', () => {
    expect(apartByCation(series)).toEqual(series)
    const allPotassium = series.map(one => ({ ...one, salt: { ...one.salt, cation: 'K^+' } }))
    expect(apartByCation(allPotassium)).toEqual(allPotassium)
  })

  it('gives a salt of another cation a place of its own, so that none is hidden or pooled', () => {
    const apart = apartByCation([...series, potassium])
    const { rows } = arrange(apart, apart, 'anion', railEntries(apart, 0.3).map(({ ion }) => ion))
    expect(rows.flatMap(row => row.cells).filter(Boolean)).toHaveLength(series.length + 1)
    expect(rows.find(row => row.ion === 'KCl')?.cells.filter(Boolean).map(one => one!.id)).toEqual(['potassium'])
    expect(railEntries(apart, 0.3).find(({ ion }) => ion === 'Cl^-')).toEqual(railEntries(series, 0.3).find(({ ion }) => ion === 'Cl^-'))
  })

  it('takes sodium as usual where as many series have another cation', () => {
    const sodium = at('Norrvik', 'spring', 'Cl^-')
    expect(apartByCation([potassium, sodium]).map(({ salt }) => salt.anion)).toEqual(['KCl', 'Cl^-'])
  })
})

describe('acrossGroups', () => {
  it('puts a season of all labs before the next season', () => {
    const { columns } = arrange(series, series, 'anion', order)
    expect(acrossGroups(columns).map(place => columns[place]!.title)).toEqual(['spring', 'spring', 'spring', 'autumn', 'autumn', 'autumn'])
  })
})

describe('shown', () => {
  it('finds series with a binding term and with readings set aside', () => {
    expect(shown(series, 'binding', attention).every(one => one.fit?.model === 'linear-langmuir')).toBe(true)
    expect(shown(series, 'set-aside', attention)).toHaveLength(9)
  })
})

describe('sharedAxes', () => {
  it('hold every reading and dot the cloud point without salt', () => {
    const axes = sharedAxes(series)
    const ys = series.flatMap(one => one.readings.map(({ y }) => y))
    expect(axes.y[0]).toBeLessThan(Math.min(...ys))
    expect(axes.y[1]).toBeGreaterThan(Math.max(...ys))
    expect(axes.level).toBe(31)
    expect(axes.yTicks).toEqual([20, 25, 31])
  })

  it('stand also where there is no reading', () => {
    expect(sharedAxes([]).level).toBeNull()
  })
})

describe('panelDrawing', () => {
  const axes = sharedAxes(series)

  it('keeps all it draws inside the panel', () => {
    for (const one of series) {
      const { curve, dots } = panelDrawing(one, axes)
      for (const [, x, y] of `${curve}${dots}`.matchAll(/[ML](\S+) ([\d.-]+)/g)) {
        expect(Number(x)).toBeGreaterThanOrEqual(0)
        expect(Number(x)).toBeLessThanOrEqual(100)
        expect(Number(y)).toBeGreaterThanOrEqual(0)
        expect(Number(y)).toBeLessThanOrEqual(100)
      }
    }
  })

  it('draws a reading that is set aside apart from the others', () => {
    expect(panelDrawing(at('Norrvik', 'spring', 'SCN^-'), axes).setAside).toHaveLength(1)
  })
})

describe('remarkOf', () => {
  it.each([
    ['Ostrel', 'autumn', 'ClO4^-', '3 readings'],
    ['Quaymere', 'autumn', 'H2PO4^-', 'no readings'],
    ['Quaymere', 'autumn', 'NO3^-', 'no blank'],
    ['Quaymere', 'spring', 'I^-', '[M] too low?'],
    ['Norrvik', 'spring', 'SCN^-', null],
  ])('says of %s, %s, %s: %s', (lab, campaign, ion, remark) => {
    const one = at(lab, campaign, ion)
    expect(remarkOf(one, attention.get(one.id))).toBe(remark)
  })
})

describe('the words of the series page', () => {
  it('count a blank once that several series share', () => {
    expect(summaryLine(series)).toBe('60 series, 59 with readings: ten salts, six campaigns. 812 readings, 9 set aside.')
  })

  it('name a series', () => {
    expect(seriesTitle(at('Norrvik', 'spring', 'SCN^-'))).toBe('thiocyanate, Norrvik, spring')
  })

  it('say each finding with its numbers', () => {
    const [scale, offset, empty] = findings.map(findingNote)
    expect(scale).toMatchObject({ heading: 'Quaymere’s iodide stands apart', tagLabel: 'Two series to look at' })
    expect(scale!.sentences[0]).toMatch(/Both campaigns run as if every concentration were 0\.8\d of the label; no other salt of Quaymere does\. Its stock was 14 months old/)
    expect(offset).toMatchObject({ heading: 'Ostrel starts 0.4 K higher' })
    expect(empty!.sentences).toEqual(['Ostrel, autumn, has three readings of ClO₄⁻: too few for a fit. Quaymere has not measured H₂PO₄⁻ in autumn.'])
  })

  it('count and list in plain English', () => {
    expect([counted(1, 'salt'), counted(3, 'salt'), counted(40, 'salt')]).toEqual(['one salt', 'three salts', '40 salts'])
    expect([listed([]), listed(['a']), listed(['a', 'b']), listed(['a', 'b', 'c'])]).toEqual(['', 'a', 'a and b', 'a, b and c'])
  })
})
