/**
 * What to weigh for a salt solution, and what a weighing gave. Concentrations are amounts of the anhydrous salt.
 *
 * Nothing here turns mol/kg into mol/L: that takes the density of each solution at its temperature, which is on record
 * for some salts only. A series keeps the scale it was made in.
 */
import { ScienceError, type InputProblem } from '../errors'
import { molarMass } from './molar-mass'

/** What stands in the bottle. */
export interface BottledSalt {
  /** anhydrous formula, such as Na2SO4 */
  formula: string
  /** waters a formula unit [1] */
  hydrate: number
  /** mass fraction of the named salt with its water [1]; 1 where left out */
  purity?: number
}

const isPositive = (value: number) => Number.isFinite(value) && value > 0

function check(problems: readonly (InputProblem | false)[]): void {
  const found = problems.filter(problem => problem !== false)
  if (found.length > 0) throw new ScienceError('bad-stock', found)
}

/** Molar mass of the salt with its water [g/mol]. */
function bottledMolarMass({ formula, hydrate }: BottledSalt): number {
  return molarMass(formula) + hydrate * molarMass('H2O')
}

function bottleProblems({ hydrate, purity = 1 }: BottledSalt): (InputProblem | false)[] {
  return [
    !(Number.isFinite(hydrate) && hydrate >= 0) && { path: 'hydrate', message: 'must be 0 or more' },
    !(isPositive(purity) && purity <= 1) && { path: 'purity', message: 'must be above 0 and at most 1' },
  ]
}

/**
 * Mass to weigh: m = c·V·M/w, with M of the salt as bottled and its mass fraction w.
 *
 * @param concentration wanted [mol/L], or [mol/kg] with the mass of water in place of the volume
 * @param volume to make up to [L], or mass of water [kg]; the water that a hydrate brings is not taken off it
 * @returns mass of the bottled salt [g]
 * @throws ScienceError 'bad-stock' with every problem, 'not-a-formula'
 */
export function massToWeigh(bottle: BottledSalt, concentration: number, volume: number): number {
  check([
    ...bottleProblems(bottle),
    !isPositive(concentration) && { path: 'concentration', message: 'must be above 0' },
    !isPositive(volume) && { path: 'volume', message: 'must be above 0' },
  ])
  return concentration * volume * bottledMolarMass(bottle) / (bottle.purity ?? 1)
}

/**
 * True over intended concentration when a bottle was weighed as if it held the pure anhydrous salt: w·M(anhydrous)/M(bottled).
 *
 * @returns ratio [1], at most 1
 * @throws ScienceError 'bad-stock' with every problem, 'not-a-formula'
 */
export function shareWhenTakenAsAnhydrous(bottle: BottledSalt): number {
  check(bottleProblems(bottle))
  return (bottle.purity ?? 1) * molarMass(bottle.formula) / bottledMolarMass(bottle)
}

/**
 * Error of the concentration when a hydrate was weighed as the anhydrous salt, purity aside.
 *
 * @returns [%], negative: the solution is weaker than its label
 * @throws ScienceError 'bad-stock', 'not-a-formula'
 */
export function hydrateMistake({ formula, hydrate }: BottledSalt): number {
  return 100 * (shareWhenTakenAsAnhydrous({ formula, hydrate }) - 1)
}
