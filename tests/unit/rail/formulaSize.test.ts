import { describe, expect, it } from 'vitest'
import { anions, furtherAnions } from '#shared/science/chemistry/ions'
import { formulaSize } from '~~/components/chart/formulaSize'

/** Room beside the mark of the narrowest chip [px]. */
const narrow = 52

describe('formulaSize', () => {
  it('leaves the ten anions of the order at their usual size on the narrowest chip', () => {
    expect(anions.map(({ formula }) => formulaSize(formula, narrow))).toEqual(anions.map(() => 14))
  })

  it('makes a long formula smaller, and keeps every anion readable', () => {
    expect(formulaSize('B(C6H5)4^-', narrow)).toBeLessThan(14)
    expect(furtherAnions.filter(({ formula }) => formulaSize(formula, narrow) <= 9)).toEqual([])
  })
})
