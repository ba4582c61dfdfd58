import { ScienceError } from '../errors'

/**
 * Standard atomic weights [g/mol] of the elements that the salts here contain; for elements given as an interval the
 * conventional value; deuterium by itself.
 * @source IUPAC Commission on Isotopic Abundances and Atomic Weights, standard atomic weights 2021 (from memory,
 * checked by the masses in data-seeds/chemistry/salt_hydrates.csv)
 */
const atomicWeights: Readonly<Record<string, number>> = {
  H: 1.008, D: 2.014101778, Li: 6.94, B: 10.81, C: 12.011, N: 14.007, O: 15.999, F: 18.998403162, Na: 22.98976928, Mg: 24.305, Al: 26.9815384, Si: 28.085,
  P: 30.973761998, S: 32.06, Cl: 35.45, K: 39.0983, Ca: 40.078, Cr: 51.9961, Mn: 54.938043, Fe: 55.845, Co: 58.933194, Ni: 58.6934, Cu: 63.546,
  Zn: 65.38, Se: 78.971, Br: 79.904, Rb: 85.4678, Sr: 87.62, Mo: 95.95, Ag: 107.8682, Cd: 112.414, I: 126.90447, Cs: 132.90545196,
  Ba: 137.327, La: 138.90547, W: 183.84, Re: 186.207,
}

const water = 2 * atomicWeights.H! + atomicWeights.O!

const token = /([A-Z][a-z]?)|(\()|(\))|(\d+)/y

type Total = { mass: number, last: number }

/** Sums a formula in one pass; null where it is none. */
function massOf(formula: string): number | null {
  const open: Total[] = [{ mass: 0, last: 0 }]
  token.lastIndex = 0
  while (token.lastIndex < formula.length) {
    const match = token.exec(formula)
    const total = open.at(-1)
    if (!match || !total) return null
    const [, element, opens, closes, digits] = match
    if (element) {
      total.last = atomicWeights[element] ?? NaN
      total.mass += total.last
    }
    else if (opens) open.push({ mass: 0, last: 0 })
    else if (closes) {
      const group = open.pop()!.mass
      const outer = open.at(-1)
      if (!outer) return null
      outer.mass += group
      outer.last = group
    }
    else total.mass += total.last * (Number(digits) - 1)
  }
  const [whole] = open
  return open.length === 1 && whole!.mass > 0 ? whole!.mass : null
}

/** True for element symbols, counts and closed parentheses, such as Na2SO4, whether or not such a substance exists. */
export function isElementFormula(formula: string): boolean {
  return massOf(formula) !== null
}

/**
 * Molar mass of a salt or hydrate.
 *
 * @param formula plain text without charge, such as (NH4)2SO4, Na2SO4·10H2O or Na2SO4.10H2O
 * @returns molar mass [g/mol]
 * @throws ScienceError 'not-a-formula' for anything but element symbols, counts and parentheses
 */
export function molarMass(formula: string): number {
  const [, salt = '', dot, count] = /^(.+?)(?:([·.])(\d+(?:\.\d+)?)?H2O)?$/.exec(formula) ?? []
  const waters = dot ? Number(count ?? 1) : 0
  const mass = massOf(salt)
  if (mass === null) throw new ScienceError('not-a-formula', [{ path: 'formula', message: `${formula} is not a formula of known elements; write it like Na2SO4 or Na2SO4·10H2O` }])
  return mass + waters * water
}
