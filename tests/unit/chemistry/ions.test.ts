import { describe, expect, it } from 'vitest'
import { anions, chargeOf, formulaPieces, hydrationOrder, plainFormula } from '#shared/science/chemistry/ions'
import { saltOf, sodiumSalts } from '#shared/science/chemistry/salts'

describe('anions', () => {
  it('run from carbonate to thiocyanate', () => {
    expect(anions.map(ion => ion.formula)).toEqual(['CO3^2-', 'SO4^2-', 'F^-', 'H2PO4^-', 'Cl^-', 'Br^-', 'NO3^-', 'I^-', 'ClO4^-', 'SCN^-'])
    expect(hydrationOrder('CO3^2-')).toBeLessThan(hydrationOrder('SCN^-'))
    expect(hydrationOrder('PF6^-')).toBe(anions.length)
  })

  it('carry their charge', () => {
    expect(chargeOf('SO4^2-')).toBe(-2)
    expect(chargeOf('Na^+')).toBe(1)
    expect(chargeOf('H2O')).toBe(0)
  })

  it('are cut into what stands on, below and above the line', () => {
    expect(formulaPieces('H2PO4^-')).toEqual([
      { text: 'H' }, { text: '2', place: 'sub' }, { text: 'PO' }, { text: '4', place: 'sub' }, { text: '−', place: 'sup' },
    ])
    expect(plainFormula('SO4^2-')).toBe('SO₄²⁻')
  })
})

describe('sodium salts', () => {
  it('are neutral', () => {
    for (const salt of sodiumSalts) expect(salt.cationCount * chargeOf(salt.cation) + salt.anionCount * chargeOf(salt.anion)).toBe(0)
  })

  it('are found by their formula', () => {
    expect(saltOf('Na2SO4')).toMatchObject({ name: 'sodium sulfate', anion: 'SO4^2-', cationCount: 2 })
    expect(saltOf('NaH2PO4')?.name).toBe('sodium dihydrogen phosphate')
    expect(saltOf('KCl')).toBeUndefined()
  })
})
