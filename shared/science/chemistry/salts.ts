import { anions, chargeOf, type Ion } from './ions'

/** A salt as series name it: formula in plain text, ions with charges, and how many of each one unit gives. */
export interface Salt {
  formula: string
  name: string
  anion: string
  cation: string
  anionCount: number
  cationCount: number
}

const sodium = 'Na^+'

function sodiumSaltOf({ formula: anion, name, charge }: Ion): Salt {
  const cationCount = -charge / chargeOf(sodium)
  const [body] = anion.split('^')
  return { formula: `Na${cationCount > 1 ? cationCount : ''}${body}`, name: `sodium ${name}`, anion, cation: sodium, anionCount: 1, cationCount }
}

/** The sodium salt of each anion, in the anions' order. */
export const sodiumSalts: readonly Salt[] = anions.map(sodiumSaltOf)

const byFormula = new Map(sodiumSalts.map(salt => [salt.formula, salt]))

export function saltOf(formula: string): Salt | undefined {
  return byFormula.get(formula)
}
