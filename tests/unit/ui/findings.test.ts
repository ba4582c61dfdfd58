import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import type { Point } from '#shared/science/fitting/types'
import { examples } from '~~/composables/sheet/examples'
import { bindingFinding, straightLineFinding, tradeOffFinding } from '~~/components/ui/findings'

function pointsOf(name: string): Point[] {
  return examples.find(example => example.name === name)!.rows.map(([x, y]) => ({ x: Number(x), y: Number(y) }))
}

const thiocyanate = pointsOf('thiocyanate')
const sulfate = pointsOf('sulfate')

describe('bindingFinding', () => {
  it('says by how much a straight line misses readings that bend', () => {
    const note = bindingFinding(fit({ model: 'linear-langmuir', points: thiocyanate }), fit({ model: 'linear', points: thiocyanate }))
    expect(note).toMatchObject({ heading: 'The binding term is needed', tag: 'holds' })
    expect(note?.sentences[0]).toMatch(/misses by up to 0\.\d\d? K/)
  })

  it('says nothing about readings on a line', () => {
    expect(bindingFinding(fit({ model: 'linear-langmuir', points: sulfate }), fit({ model: 'linear', points: sulfate }))).toBeNull()
  })
})

describe('straightLineFinding', () => {
  const line = { deltaAicc: -3.2, probability: 0.4, detectable: { bmax: 0.31, k: 5 } }

  it('says how large a binding would have been seen where there is no evidence of one', () => {
    const note = straightLineFinding({ verdict: 'no-evidence', ...line })
    expect(note).toMatchObject({ heading: 'A straight line is enough', tag: 'holds' })
    expect(note?.sentences[0]).toContain('above about 0.31 K, at *K* = 5')
  })

  it('keeps open what the readings do not decide, with both numbers', () => {
    const note = straightLineFinding({ verdict: 'undecided', deltaAicc: 2.9, probability: 0.03, detectable: null })
    expect(note).toMatchObject({ heading: 'Binding is not settled', tag: 'not-settled' })
    expect(note?.sentences[0]).toMatch(/AICc by 2\.9, and on a true straight line a bend like this has a probability of 0\.03/)
  })

  it('does not call a worse AICc an improvement', () => {
    const note = straightLineFinding({ verdict: 'undecided', deltaAicc: -30, probability: 0.002, detectable: null })
    expect(note?.sentences[0]).toMatch(/^These readings are too few for AICc .* probability of 0\.002/)
  })

  it('is silent where binding stands or the readings are too few for a verdict', () => {
    expect(straightLineFinding({ verdict: 'supported', ...line })).toBeNull()
    expect(straightLineFinding({ verdict: null, deltaAicc: null, probability: null, detectable: null })).toBeNull()
  })
})

describe('tradeOffFinding', () => {
  it('quotes the product when the two constants move against each other', () => {
    const note = tradeOffFinding(fit({ model: 'linear-langmuir', points: thiocyanate }))
    expect(note?.sentences[0]).toMatch(/^Correlation −0\.9\d\. Quote the product, 18\.59\(82\)/)
  })

  it('says nothing where they are not determined', () => {
    expect(tradeOffFinding(fit({ model: 'linear-langmuir', points: sulfate }))).toBeNull()
  })
})
