import { describe, expect, it } from 'vitest'
import { sensitivityOf, type Variation } from '#shared/science/diagnostics/sensitivity'
import { fit } from '#shared/science/fitting'
import { seriesSensitivity, sensitivitySentence, variationWords } from '~~/components/series/page/sensitivityRows'
import { sampleSeries } from '../series/sample'

const aside = { reason: 'dust', by: 'x', at: '2026-03-05T10:00:00.000Z' }
const series = sampleSeries({ 8: { y: 31.2, setAside: aside, entersFit: false } })
const request = { model: 'linear-langmuir', weighting: 'replicates' } as const
const sensitivity = sensitivityOf(series.readings, request, series.fit!, 'on-heating')
const rowOf = (code: Variation['code']) => sensitivity.rows.find(({ variation }) => variation.code === code)!
const K = (row: ReturnType<typeof rowOf>) => row.constants.find(({ name }) => name === 'K')!

describe('the sensitivity of constants', () => {
  it('measures each move in standard errors of the fit in question', () => {
    const own = series.fit!.parameters.find(({ name }) => name === 'K')!
    const restored = fit({ ...request, points: series.readings.map(({ x, y }) => ({ x, y, n: 3 })) }).parameters.find(({ name }) => name === 'K')!
    expect(K(rowOf('restored')).estimate).toBeCloseTo(restored.estimate!, 9)
    expect(K(rowOf('restored')).shift).toBeCloseTo((restored.estimate! - own.estimate!) / own.standardError!, 9)
  })

  it('covers form, weights, robust fits, readings set aside, blanks', () => {
    expect(new Set(sensitivity.rows.map(({ variation }) => variation.code))).toEqual(new Set(['model', 'weighting', 'robust', 'restored', 'without-blanks']))
    expect(sensitivity.rows.filter(({ variation }) => variation.code === 'weighting').map(({ variation }) => variation)).toEqual([{ code: 'weighting', weighting: 'none' }])
  })

  it('has no number for a constant that the other form does not have', () => {
    const line = sensitivity.rows.find(({ variation }) => variation.code === 'model' && variation.model === 'linear')!
    expect(K(line)).toEqual({ name: 'K', estimate: null, shift: null })
    expect(line.constants[0]!.shift).not.toBeNull()
  })

  it('compares the branches where both were measured', () => {
    const both = [...series.readings, ...series.readings.map(reading => ({ ...reading, direction: 'cooling' as const, y: reading.y - 0.3 }))]
    const rows = sensitivityOf(both, request, series.fit!, 'on-heating').rows
    const branch = rows.find(({ variation }) => variation.code === 'branch')!
    expect(branch.constants[0]!.estimate).toBeCloseTo(series.fit!.parameters[0]!.estimate! - 0.3, 6)
  })

  it('keeps what is held in the forms that have it', () => {
    const held = fit({ ...request, parameters: { K: { fixed: 4 } }, points: series.readings.filter(({ entersFit }) => entersFit).map(({ x, y }) => ({ x, y, n: 3 })) })
    const { rows } = sensitivityOf(series.readings, { ...request, parameters: { K: { fixed: 4 } } }, held, 'on-heating')
    expect(rows.every(({ constants }) => constants.every(({ name }) => name !== 'K'))).toBe(true)
    expect(rows.length).toBeGreaterThan(4)
  })
})

describe('what is said of it', () => {
  it('is one sentence, quiet where nothing moves', () => {
    const calm = seriesSensitivity(sampleSeries())!
    const quiet = { rows: calm.rows.map(row => ({ ...row, constants: row.constants.map(one => ({ ...one, shift: one.shift === null ? null : 0.3 })) })) }
    expect(sensitivitySentence(quiet)).toBe('With the same form no constant moves by more than 0.3 standard errors.')
    expect(sensitivitySentence(sensitivity)).toMatch(/^With the same form, in standard errors: .*\*K\* by up to \d+\.\d \(.*set aside is back\)/)
    expect(sensitivitySentence({ rows: [] })).toMatch(/no other choice/)
  })

  it.each<[Variation, string]>([
    [{ code: 'model', model: 'linear' }, 'straight line'], [{ code: 'weighting', weighting: 'none' }, 'equal weights'], [{ code: 'robust', kind: 'tukey' }, 'robust, Tukey’s weights'],
    [{ code: 'restored', count: 2 }, 'two readings set aside are back'], [{ code: 'without-blanks', count: 3 }, 'without the blanks'], [{ code: 'branch', direction: 'cooling' }, 'the cooling branch'],
  ])('%j is %s', (variation, words) => expect(variationWords(variation)).toBe(words))
})
