import { describe, expect, it } from 'vitest'
import { isElementFormula, molarMass } from '#shared/science/chemistry/molar-mass'
import { hydrateMistake, massToWeigh, shareWhenTakenAsAnhydrous } from '#shared/science/chemistry/stocks'

describe('molarMass', () => {
  it('counts groups within groups', () => {
    expect(molarMass('(C(NH2)3)2SO4')).toBeCloseTo(2 * molarMass('C(NH2)3Cl') - 2 * molarMass('Cl') + molarMass('SO4'), 10)
  })

  it('takes half a water', () => {
    expect(molarMass('Na2SO4·0.5H2O') - molarMass('Na2SO4')).toBeCloseTo(molarMass('H2O') / 2, 10)
  })

  it.each(['', 'Xx', 'nacl', 'Na2SO4)', '(NH4', 'Na 2', '4'])('refuses %j', (text) => {
    expect(isElementFormula(text)).toBe(false)
    expect(() => molarMass(text)).toThrow('not-a-formula')
  })
})

describe('massToWeigh', () => {
  it('gives 14.2 g of sodium sulfate for 100 mL of 1 M, 32.2 g of its decahydrate', () => {
    expect(massToWeigh({ formula: 'Na2SO4', hydrate: 0 }, 1, 0.1)).toBeCloseTo(14.204, 3)
    expect(massToWeigh({ formula: 'Na2SO4', hydrate: 10 }, 1, 0.1)).toBeCloseTo(32.219, 3)
  })

  it('asks for more of an impure salt', () => {
    const bottle = { formula: 'NaSCN', hydrate: 0 }
    expect(massToWeigh({ ...bottle, purity: 0.98 }, 0.5, 0.25)).toBeCloseTo(massToWeigh(bottle, 0.5, 0.25) / 0.98, 10)
  })

  it('names every problem at once', () => {
    expect(() => massToWeigh({ formula: 'NaCl', hydrate: -1, purity: 1.2 }, 0, NaN)).toThrow(/hydrate: .*\npurity: .*\nconcentration: .*\nvolume: /)
  })
})

describe('a hydrate taken for the anhydrous salt', () => {
  it('makes a solution weaker than its label', () => {
    expect(hydrateMistake({ formula: 'NaClO4', hydrate: 1 })).toBeCloseTo(-12.83, 2)
    expect(hydrateMistake({ formula: 'NaCl', hydrate: 0 })).toBe(0)
  })

  it('adds to what purity takes away', () => {
    expect(shareWhenTakenAsAnhydrous({ formula: 'NaClO4', hydrate: 1, purity: 0.99 })).toBeCloseTo(0.99 * (1 - 0.1283), 4)
  })
})
