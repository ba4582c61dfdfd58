import { describe, expect, it } from 'vitest'
import { noteCodes, type FitNote, type NoteCode } from '#shared/science/fitting/types'
import { noteSentences } from '~~/components/ui/noteSentences'

/** Values as the engine gives them, for each code. */
const values: Record<NoteCode, FitNote['values']> = {
  'binding-not-identified': { end: 'infinity', Bmax: 1.2, BmaxStandardError: 0.05, c: -4, cStandardError: 0.1 },
  'weakly-determined': { parameter: 'K', factor: 4.2, condition: 350 },
  'holds-as-product': { factor: 5, product: 18.5, productStandardError: 0.8, percent: 4.4 },
  'sign-of-binding-unknown': { lower: -0.3, upper: 0.5 },
  'saturation-not-reached': { reach: 0.5, occupancy: 33.3, highest: 0.1, needed: 0.2 },
  'low-concentrations-missing': { reach: 2, lowest: 0.4, needed: 0.2 },
  'blank-missing': { lowest: 0.05 },
  'few-points': { n: 6, parameters: 4, degreesOfFreedom: 2 },
  'one-point-decides': { reading: 7, x: 0.5, y: 31.27, parameter: 'K', shift: 4.1, change: 1.4 },
  'pattern-in-residuals': { runs: 3, expected: 7.5, probability: 0.002 },
  'not-normal': { w: 0.7, probability: 0.001 },
  'lack-of-fit': { f: 12, probability: 0.001, levels: 8 },
  'weights-dominate': { effective: 2.1, n: 12, reading: 3, percent: 61 },
  'weights-from-few-replicates': { fewest: 3, needed: 6 },
  'resolution-floor': { count: 2, floor: 0.0029, reading: 4 },
  'parameter-at-bound': { parameter: 'K', side: 'upper', bound: 100 },
  'not-converged': {},
  'singular': { condition: null },
  'no-evidence-of-binding': { deltaAicc: -3, probability: 0.4, detectableBmax: 0.21, atK: 5 },
  'extrapolated': { quantity: 'crossoverConcentration', value: 1.4, highest: 1 },
  'screening-region': {},
  'ph-not-held': {},
  'concentrations-taken-as-exact': { percent: 1, effect: 0.11, s: 0.03 },
}

function wordsOf(code: NoteCode, given: FitNote['values'] = values[code]): string {
  const { heading, sentences } = noteSentences({ code, severity: 'caution', values: given })
  return [heading, ...sentences].join(' ')
}

describe('noteSentences', () => {
  it.each(noteCodes)('says %s in whole sentences', (code) => {
    const { heading, sentences } = noteSentences({ code, severity: 'caution', values: values[code] })
    expect(heading).not.toMatch(/[.]$/)
    expect(sentences.length).toBeGreaterThan(0)
    for (const sentence of sentences) expect(sentence).toMatch(/[.]$/)
  })

  it.each(noteCodes)('leaves no gap in %s when every value is there', (code) => {
    expect(wordsOf(code)).not.toMatch(/—|undefined|NaN|null/)
  })

  it.each([
    ['saturation-not-reached', '33 %'], ['one-point-decides', 'reading 7'], ['one-point-decides', '31.27 °C'], ['holds-as-product', '18.50(80)'],
    ['binding-not-identified', '1.200(50) K'], ['no-evidence-of-binding', '0.21 K'], ['weakly-determined', 'a factor of 4.2'], ['few-points', 'leave 2'],
  ] as const)('gives the number behind %s: %s', (code, number) => {
    expect(wordsOf(code)).toContain(number)
  })

  it('tells the two ends of an unidentified binding apart', () => {
    const zero = wordsOf('binding-not-identified', { end: 'zero', initialSlope: -30, initialSlopeStandardError: 0.26, curvature: 1.2, curvatureStandardError: 0.9 })
    expect(zero).toContain('runs to zero')
    expect(zero).toContain('−30.00(26)')
    expect(wordsOf('binding-not-identified', { end: 'infinity', plateau: 32.1, plateauStandardError: 0.04 })).toContain('32.100(40) °C')
  })

  it('says that nothing is left to judge by when constants and readings are as many', () => {
    expect(noteSentences({ code: 'few-points', severity: 'problem', values: { n: 4, parameters: 4, degreesOfFreedom: 0 } }).tag).toBe('no-constants')
  })

  it('calls a reading what the page calls it', () => {
    const { sentences } = noteSentences({ code: 'one-point-decides', severity: 'caution', values: values['one-point-decides'] }, place => `row ${place + 3}`)
    expect(sentences[0]).toContain('row 10')
  })

  it('speaks of open ends where an interval has none', () => {
    expect(wordsOf('sign-of-binding-unknown', { lower: null, upper: 0.5 })).toContain('no lower bound')
    expect(wordsOf('weakly-determined', { parameter: 'K', factor: null, condition: 10 })).toContain('open on one side')
  })
})
