/**
 * Source: IUPAC standard atomic weights 2021 (abridged or conventional), from memory and compared with two library tables;
 * the molar masses and errors of data-seeds/chemistry/salt_hydrates.csv were computed from them apart from this code.
 */
import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { molarMass } from '#shared/science/chemistry/molar-mass'
import { readSalt } from '#shared/science/chemistry/read-salt'
import { hydrateMistake, massToWeigh } from '#shared/science/chemistry/stocks'
import { readCsv } from '~~/data-seeds/chemistry/csv'

const rows = readCsv(readFileSync(new URL('../../data-seeds/chemistry/salt_hydrates.csv', import.meta.url), 'utf8'))
const hydrates = rows.filter(row => row.hydrate_formula !== 'NULL')

/** Half the last printed digit, and the rounding of the sums behind it. */
const massTolerance = 0.00051
const percentTolerance = 0.0051

function watersOf(formula: string): number {
  const reading = readSalt(formula)
  if (reading.kind !== 'salt') throw new Error(`${formula} is not read as a salt`)
  return reading.hydrate
}

describe('molarMass', () => {
  it.each(rows)('agrees with the table for $anhydrous_formula', (row) => {
    expect(Math.abs(molarMass(row.anhydrous_formula!) - Number(row.anhydrous_molar_mass_g_per_mol))).toBeLessThan(massTolerance)
  })

  it.each(hydrates)('agrees with the table for $hydrate_formula', (row) => {
    expect(Math.abs(molarMass(row.hydrate_formula!) - Number(row.hydrate_molar_mass_g_per_mol))).toBeLessThan(massTolerance)
  })
})

describe('hydrateMistake', () => {
  it.each(hydrates)('agrees with the table for $hydrate_formula taken as $anhydrous_formula', (row) => {
    const mistake = hydrateMistake({ formula: row.anhydrous_formula!, hydrate: watersOf(row.hydrate_formula!) })
    expect(Math.abs(-mistake - Number(row.concentration_error_percent_if_hydrate_weighed_as_anhydrous))).toBeLessThan(percentTolerance)
  })
})

describe('massToWeigh', () => {
  it.each(hydrates)('asks for the mass ratio of the table more of $hydrate_formula', (row) => {
    const bottle = { formula: row.anhydrous_formula!, hydrate: watersOf(row.hydrate_formula!) }
    const ratio = massToWeigh(bottle, 0.5, 0.1) / massToWeigh({ ...bottle, hydrate: 0 }, 0.5, 0.1)
    expect(ratio).toBeCloseTo(Number(row.mass_ratio_hydrate_to_anhydrous), 4)
  })
})

describe('readSalt', () => {
  it.each(rows)('reads the name $salt as $anhydrous_formula', (row) => {
    expect(readSalt(row.salt!)).toMatchObject({ kind: 'salt', salt: { formula: row.anhydrous_formula }, hydrate: 0 })
  })
})
