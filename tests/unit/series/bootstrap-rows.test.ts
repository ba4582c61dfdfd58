import { describe, expect, it } from 'vitest'
import { bootstrapRows, bootstrapSentence, endsText } from '~~/components/series/page/bootstrapRows'

const drawn = {
  id: 'x', at: '2026-03-05T10:00:00.000Z', kind: 'case' as const, samples: 2_000, seed: 7, confidence: 0.95, withoutOptimum: 50, bands: null,
  quantities: [{ name: 'K', unit: 'M⁻¹', estimate: 4.6123, standardError: 0.31, percentile: { lower: 4.0712, upper: null }, bca: null }],
}

describe('a bootstrap on the page', () => {
  it('prints values with their scatter and intervals with open ends', () => {
    expect(bootstrapRows(drawn)).toEqual([{ name: 'K', unit: 'M⁻¹', value: '4.61(31)', percentile: 'above 4.071', bca: 'not had' }])
    expect(endsText({ lower: null, upper: 2 })).toBe('below 2')
    expect(endsText({ lower: -1.5, upper: 2 })).toBe('−1.5 to 2')
    expect(endsText({ lower: null, upper: null })).toBe('open on both sides')
  })

  it('says how it was drawn and what became of the draws', () => {
    expect(bootstrapSentence(drawn)).toBe('2,000 draws, readings drawn anew, concentration by concentration, seed 7. In 2.5 % of the draws the best K lay at 0 or without bound; an interval that reaches them is open.')
    expect(bootstrapSentence({ ...drawn, withoutOptimum: 0 })).toMatch(/seed 7\.$/)
  })
})
