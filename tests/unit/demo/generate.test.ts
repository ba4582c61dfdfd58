import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { fromTable, toTable } from '~~/data-seeds/demo/csv'
import { generateReadings, trueCloudPoint } from '~~/data-seeds/demo/generate'

const committed = readFileSync(new URL('../../../data-seeds/demo/readings.tsv', import.meta.url), 'utf8')
const readings = generateReadings()
const of = (lab: string, campaign: string, anion: string) =>
  readings.filter(reading => reading.lab === lab && reading.campaign === campaign && reading.anion === anion)

describe('the demonstration readings', () => {
  it('are those the generator writes', () => {
    expect(toTable(readings)).toBe(committed)
  })

  it('come back from their table as they were', () => {
    expect(fromTable(committed)).toEqual(readings)
  })

  it('count 812 in 59 series, 9 set aside with a reason, a person and a day', () => {
    expect(readings).toHaveLength(812)
    const series = new Set(readings.filter(({ anion }) => anion).map(({ lab, campaign, anion }) => `${lab} ${campaign} ${anion}`))
    expect(series.size).toBe(59)
    const aside = readings.filter(({ setAsideReason }) => setAsideReason)
    expect(aside).toHaveLength(9)
    expect(aside.every(({ setAsideBy, setAsideOn }) => setAsideBy && setAsideOn)).toBe(true)
  })

  it('leave the places empty that the scenario names', () => {
    expect(of('Ostrel', 'autumn', 'ClO4^-')).toHaveLength(3)
    expect(of('Quaymere', 'autumn', 'H2PO4^-')).toHaveLength(0)
    const [nitrate] = of('Quaymere', 'autumn', 'NO3^-')
    expect(readings.filter(({ lab, day, anion }) => lab === 'Quaymere' && day === nitrate!.day && !anion)).toEqual([])
  })

  it('show Ostrel 0.4 K above Norrvik without salt', () => {
    const blank = (lab: string) => {
      const values = readings.filter(reading => reading.lab === lab && !reading.anion).map(({ value }) => value)
      return values.reduce((sum, value) => sum + value, 0) / values.length
    }
    expect(blank('Ostrel') - blank('Norrvik')).toBeCloseTo(0.4, 1)
  })
})

describe('trueCloudPoint', () => {
  it.each([
    ['CO3^2-', -11.4], ['SO4^2-', -9.1], ['H2PO4^-', -6.3], ['F^-', -6.3], ['Cl^-', -3.6],
    ['Br^-', -2.4], ['NO3^-', -1.1], ['I^-', -0.3], ['ClO4^-', -0.2], ['SCN^-', 1.0],
  ])('shifts %s by %d K at 0.30 M', (anion, shift) => {
    expect(trueCloudPoint(anion, 0.3) - trueCloudPoint(anion, 0)).toBeCloseTo(shift, 1)
  })
})
