import { describe, expect, it } from 'vitest'
import { attentionOf, findingsOf, type ComparedSeries } from '#shared/science/pooling/findings'
import { comparedOf } from '~~/components/project/overview/compared'
import { demoSummaries } from '~~/tests/support/demoSummaries'

const line = (T0: number, c: number): ComparedSeries['fit'] => ({
  model: 'linear',
  covariance: null,
  parameters: [{ name: 'T0', estimate: T0 }, { name: 'c', estimate: c }]
    .map(({ name, estimate }) => ({ name, estimate, unit: '', standardError: null, interval: null, fixed: false })),
})
const one = (lab: string, ion: string, T0: number, c: number): ComparedSeries => ({
  id: `${lab} ${ion}`, lab, campaign: 'spring', ion, fit: line(T0, c), measured: 8, hasBlank: true, reach: 1, stockAge: 2,
})
const threeAlike = ['A', 'B', 'C'].flatMap(lab => [one(lab, 'Cl^-', 31, -12), one(lab, 'Br^-', 31, -8)])

describe('findingsOf', () => {
  it('finds nothing where labs agree', () => {
    expect(findingsOf(threeAlike)).toEqual([])
  })

  it('finds nothing in nothing', () => {
    expect(findingsOf([])).toEqual([])
  })

  it('names the lab and the salt whose concentrations stand apart', () => {
    const series = [...threeAlike.filter(({ id }) => id !== 'B Cl^-'), one('B', 'Cl^-', 31, -9.6)]
    const [finding] = findingsOf(series)
    expect(finding).toMatchObject({ code: 'concentration-scale', lab: 'B', ion: 'Cl^-', series: ['B Cl^-'], isOnlySalt: true })
    expect(finding).toHaveProperty('scale', expect.closeTo(0.8, 5))
  })

  it('does not judge between two labs', () => {
    expect(findingsOf([one('A', 'Cl^-', 31, -12), one('B', 'Cl^-', 31.4, -9)])).toEqual([])
  })

  it('names the lab that reads higher than both others', () => {
    const series = threeAlike.map(compared => compared.lab === 'C' ? { ...compared, fit: line(31.4, compared.ion === 'Cl^-' ? -12 : -8) } : compared)
    expect(findingsOf(series)).toEqual([{ code: 'offset', lab: 'C', offset: expect.closeTo(0.4, 9), series: 2 }])
  })

  it('tells places with too few readings from those nobody measured', () => {
    const series = [...threeAlike, { ...one('A', 'I^-', 31, -6), fit: null, measured: 3 }, { ...one('B', 'I^-', 31, -6), fit: null, measured: 0 }]
    expect(findingsOf(series)).toMatchObject([{ code: 'empty-places', tooFew: [{ lab: 'A', measured: 3 }], notMeasured: [{ lab: 'B' }] }])
  })
})

describe('attentionOf', () => {
  it('marks series without a blank', () => {
    const series = [{ ...one('A', 'Cl^-', 31, -12), hasBlank: false }, one('B', 'Cl^-', 31, -12)]
    expect([...attentionOf(series, [])]).toEqual([['A Cl^-', 'no-blank']])
  })
})

describe('the demonstration', () => {
  const series = demoSummaries().map(comparedOf)
  const findings = findingsOf(series)

  it('shows the aged iodide, the offset and the empty places, and nothing else', () => {
    expect(findings.map(({ code }) => code)).toEqual(['concentration-scale', 'offset', 'empty-places'])
    expect(findings[0]).toMatchObject({ lab: 'Quaymere', ion: 'I^-', stockAge: 14, isOnlySalt: true })
    expect(findings[0]).toHaveProperty('scale', expect.closeTo(0.85, 1))
    expect(findings[1]).toMatchObject({ lab: 'Ostrel', offset: expect.closeTo(0.4, 1) })
    expect(findings[2]).toMatchObject({
      tooFew: [{ lab: 'Ostrel', campaign: 'autumn', ion: 'ClO4^-', measured: 3 }],
      notMeasured: [{ lab: 'Quaymere', campaign: 'autumn', ion: 'H2PO4^-' }],
    })
  })

  it('asks for a look at three series', () => {
    const marked = series.filter(({ id }) => attentionOf(series, findings).has(id)).map(({ lab, campaign, ion }) => `${lab} ${campaign} ${ion}`)
    expect(marked).toEqual(['Quaymere spring I^-', 'Quaymere autumn NO3^-', 'Quaymere autumn I^-'])
  })
})
