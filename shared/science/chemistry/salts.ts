import { anions, cations, type Ion } from './ions'

/** A salt as series name it: formula in plain text, ions with charges, and how many of each one unit gives. */
export interface Salt {
  formula: string
  name: string
  anion: string
  cation: string
  anionCount: number
  cationCount: number
}

const sodium = cations[0]!

/** Alone or counted: SO4, (SO4)3, Na2. Only single elements are counted without parentheses. */
function counted(formula: string, count: number): string {
  const [body = ''] = formula.split('^')
  if (count === 1) return body
  return /^[A-Z][a-z]?$/.test(body) ? `${body}${count}` : `(${body})${count}`
}

function nameOf(cation: Ion, cationCount: number, anion: Ion): string {
  // Suppliers sell all three sodium phosphates as 'sodium phosphate': only the count tells which.
  if (anion.formula === 'PO4^3-' && cationCount === 3 && cation.charge === 1) return `tri${cation.name} ${anion.name}`
  return `${cation.name} ${anion.name}`
}

/** The neutral salt of two ions, with the smallest counts. */
export function saltFrom(cation: Ion, anion: Ion): Salt {
  const shared = greatestCommonDivisor(cation.charge, -anion.charge)
  const cationCount = -anion.charge / shared
  const anionCount = cation.charge / shared
  return {
    formula: counted(cation.formula, cationCount) + counted(anion.formula, anionCount),
    name: nameOf(cation, cationCount, anion),
    anion: anion.formula,
    cation: cation.formula,
    anionCount,
    cationCount,
  }
}

function greatestCommonDivisor(a: number, b: number): number {
  return b === 0 ? a : greatestCommonDivisor(b, a % b)
}

/** The sodium salt of an anion. */
export function sodiumSaltOf(anion: Ion): Salt {
  return saltFrom(sodium, anion)
}

/** The sodium salt of each anion of the order, in that order. */
export const sodiumSalts: readonly Salt[] = anions.map(sodiumSaltOf)

const byFormula = new Map(sodiumSalts.map(salt => [salt.formula, salt]))

/** One of these sodium salts; for any other salt see `readSalt`. */
export function saltOf(formula: string): Salt | undefined {
  return byFormula.get(formula)
}
