import { describe, expect, it } from 'vitest'
import type { Series } from '#shared/contracts/series'
import { compareModels, fit } from '#shared/science/fitting'
import { figureReadings } from '~~/components/series/page/figureReadings'
import { inScatters, scatterUnit } from '~~/components/series/page/scatter'
import { keysOf, readingRows } from '~~/components/series/page/readingRows'
import { modelRows } from '~~/components/series/page/modelRows'
import { fitRequest, leadingConstant, usedReadings } from '~~/components/series/page/fitInput'
import { influencesOf, seriesNotes } from '~~/components/series/page/seriesNotes'
import { generateReadings } from '~~/data-seeds/demo/generate'

const id = '01890000-0000-7000-8000-000000000000'
const rows = generateReadings().filter(row => row.lab === 'Norrvik' && row.campaign === 'spring')
const readings = [...rows.filter(row => !row.anion && row.day === '2026-03-09'), ...rows.filter(row => row.anion === 'SCN^-')].map((row, index): Series['readings'][number] => ({
  id, number: index + 1, x: row.concentration, y: row.value, sd: row.sdOfReplicates / Math.sqrt(row.n), n: row.n, batch: null,
  direction: 'heating', limit: 'exact', blank: !row.anion, note: row.note || null,
  setAside: row.setAsideReason ? { reason: row.setAsideReason, by: 'Ines Tamsel', at: `${row.setAsideOn}T09:10:00.000Z` } : null,
  entersFit: !row.setAsideReason, changed: null, origin: 'invented for the demonstration',
}))
const points = readings.filter(one => !one.setAside).map(({ x, y, n }) => ({ x, y, n: n! }))

const series: Series = {
  id,
  project: { id, name: 'Shadehouse gel' },
  salt: { formula: 'NaSCN', name: 'sodium thiocyanate', anion: 'SCN^-', cation: 'Na^+' },
  campaign: { id, name: 'spring', lab: { id, name: 'Norrvik' }, clouds: 'on-heating', conditions: '' },
  stock: null,
  canEdit: true,
  revision: 4,
  choice: null,
  batches: [],
  readings,
  fit: { ...fit({ model: 'linear-langmuir', weighting: 'replicates', points }), id },
  support: compareModels({ weighting: 'replicates', points }),
  revisions: [],
}
const bare: Series = { ...series, readings: readings.slice(0, 4), fit: null, support: { verdict: null, models: [] } }

describe('readingRows', () => {
  const printed = readingRows(series)

  it('prints every reading to the same decimals, also the one set aside', () => {
    expect(printed).toHaveLength(19)
    for (const row of printed) {
      expect(row.x).toMatch(/^\d\.\d\d$/)
      expect(row.y).toMatch(/^\d\d\.\d\d$/)
      expect(row.residual).toMatch(/^([+−]\d|0)\.\d\d$|^0\.00$/)
    }
  })

  it('draws bars up to the largest residual in use and none for a reading set aside', () => {
    const bars = printed.map(({ bar }) => bar)
    expect(bars.filter(bar => bar === null)).toHaveLength(1)
    expect(Math.max(...bars.map(bar => Math.abs(bar ?? 0)))).toBeCloseTo(1, 12)
  })

  it('names blanks and letters the reading set aside', () => {
    expect(printed.slice(0, 3).map(({ note }) => note)).toEqual(['blank', 'blank', 'blank'])
    expect([...keysOf(readings)]).toEqual([[14, 'a']])
  })

  it('leaves residuals out where there is no fit', () => {
    expect(readingRows(bare).every(({ residual, bar }) => residual === '' && bar === null)).toBe(true)
  })
})

describe('modelRows', () => {
  it('shares the support among the forms and marks the fitted one', () => {
    const forms = modelRows(series)
    expect(forms.reduce((sum, { support }) => sum + (support ?? 0), 0)).toBeCloseTo(1, 12)
    expect(forms.filter(({ isFitted }) => isFitted).map(({ model }) => model)).toEqual(['linear-langmuir'])
  })
})

describe('fitRequest', () => {
  it('gives the same fit again', () => {
    const again = fit(fitRequest(series)!)
    expect(again.parameters.map(({ estimate }) => estimate)).toEqual(series.fit!.parameters.map(({ estimate }) => estimate))
    expect(usedReadings(series)).toHaveLength(18)
  })
})

describe('seriesNotes', () => {
  it('says what the reading set aside would change, under its letter', () => {
    const [first] = seriesNotes(series, influencesOf(series))
    expect(first).toMatchObject({ letter: 'a', note: { heading: 'One reading is set aside' } })
    expect(first!.note.sentences[0]).toMatch(/^Reading 14 sits 0\.\d\d K below the curve, \d+ times the scatter\. Putting it back would move \*K\* from \d\.\d+ to \d\.\d+ M\^−1\^ and the scatter from 0\.\d\d to 0\.\d\d K\.$/)
  })

  it('says that there is no fit and why', () => {
    expect(seriesNotes(bare, []).map(({ note }) => note.heading)).toEqual(['Too few readings for a fit'])
    expect(seriesNotes({ ...bare, readings: [] }, []).map(({ note }) => note.heading)).toEqual(['No readings'])
  })

  it('judges the constant that matters: K where the salt binds', () => {
    expect(leadingConstant(series)!.name).toBe('K')
    expect(leadingConstant(bare)).toBeNull()
  })
})

describe('the scatter of a fit', () => {
  const base = { residualStandardDeviation: 2 }

  it('is in kelvin, or with weights by uncertainty a multiple of what was stated', () => {
    expect(scatterUnit('replicates').symbol).toBe('K')
    expect(scatterUnit('sd').words).toBe('times the stated uncertainties')
  })

  it('measures a distance in its own unit', () => {
    expect(inScatters(-0.5, 0.1, { ...base, weighting: 'none' })).toBe(0.25)
    expect(inScatters(-0.5, 0.1, { ...base, weighting: 'sd' })).toBe(2.5)
    expect(inScatters(-0.5, null, { ...base, weighting: 'sd' })).toBeNull()
  })
})

describe('readings of the other branch', () => {
  const cooled: Series = { ...series, readings: series.readings.map(one => one.number === 5 ? { ...one, direction: 'cooling', entersFit: false } : one) }

  it('are drawn apart, without a residual, and said to be out of the fit', () => {
    expect(figureReadings(cooled).filter(({ apart }) => apart).map(({ number }) => number)).toEqual([5])
    expect(readingRows(cooled)[4]).toMatchObject({ residual: '', bar: null, note: expect.stringContaining('on cooling, not in the fit') })
  })
})
