import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import type { Point } from '#shared/science/fitting/types'
import { examples } from '~~/composables/sheet/examples'
import { bindingFinding, tradeOffFinding } from '~~/components/ui/findings'

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

describe('tradeOffFinding', () => {
  it('quotes the product when the two constants move against each other', () => {
    const note = tradeOffFinding(fit({ model: 'linear-langmuir', points: thiocyanate }))
    expect(note?.sentences[0]).toMatch(/^Correlation −0\.9\d\. Quote the product, 18\.59\(82\)/)
  })

  it('says nothing where they are not determined', () => {
    expect(tradeOffFinding(fit({ model: 'linear-langmuir', points: sulfate }))).toBeNull()
  })
})
