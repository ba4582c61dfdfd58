import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import type { Point } from '#shared/science/fitting/types'
import { chooseModel } from '~~/components/landing/modelChoice'
import { examples } from '~~/composables/sheet/examples'

function pointsOf(name: string): Point[] {
  return examples.find(example => example.name === name)!.rows.map(([x, y]) => ({ x: Number(x), y: Number(y) }))
}

function choiceOf(points: Point[]) {
  return chooseModel({ binding: fit({ model: 'linear-langmuir', points }), line: fit({ model: 'linear', points }) })
}

describe('chooseModel', () => {
  it('shows the binding term where the readings ask for it, with the line for comparison', () => {
    const choice = choiceOf(pointsOf('thiocyanate'))
    expect(choice).toMatchObject({ isStraight: false, shown: { model: 'linear-langmuir' }, straightLine: { model: 'linear' } })
  })

  it('shows the straight line where nothing speaks for binding, and says only that of it', () => {
    const choice = choiceOf(pointsOf('sulfate'))
    expect(choice).toMatchObject({ isStraight: true, shown: { model: 'linear' }, straightLine: null })
    expect(choice?.notes[0]?.code).toBe('no-evidence-of-binding')
    expect(choice?.notes.map(note => note.code)).not.toContain('binding-not-identified')
  })

  it('shows no constants that pass through every reading', () => {
    const choice = choiceOf(pointsOf('too few'))
    expect(choice?.shown).toBeNull()
    expect(choice?.notes.map(note => note.code)).toContain('few-points')
  })

  it('shows the line alone where readings are too few for binding', () => {
    const line = fit({ model: 'linear', points: [{ x: 0, y: 31 }, { x: 0.2, y: 30.1 }, { x: 0.4, y: 28.9 }] })
    expect(chooseModel({ binding: null, line })).toMatchObject({ shown: { model: 'linear' }, isStraight: true })
  })

  it('shows nothing without a fit', () => {
    expect(chooseModel({ binding: null, line: null })).toBeNull()
  })
})
