import { cationNames, furtherAnionNames } from './further-ions'

/** The anions of the demonstration and the shelf's first rows, from strongly to weakly hydrated (common practice). */
export interface Ion {
  /** plain text, such as SO4^2- */
  formula: string
  /** charge number z */
  charge: number
  name: string
  /** formula without charge for display, such as [{ text: 'SO' }, { text: '4', place: 'sub' }] */
  pieces: readonly FormulaPiece[]
}

export interface FormulaPiece {
  text: string
  place?: 'sub' | 'sup'
}

const names: readonly (readonly [formula: string, name: string])[] = [
  ['CO3^2-', 'carbonate'],
  ['SO4^2-', 'sulfate'],
  ['F^-', 'fluoride'],
  ['H2PO4^-', 'dihydrogen phosphate'],
  ['Cl^-', 'chloride'],
  ['Br^-', 'bromide'],
  ['NO3^-', 'nitrate'],
  ['I^-', 'iodide'],
  ['ClO4^-', 'perchlorate'],
  ['SCN^-', 'thiocyanate'],
]

function ionFrom([formula, name]: readonly [formula: string, name: string]): Ion {
  return { formula, name, charge: chargeOf(formula), pieces: formulaPieces(formula) }
}

/** Strongly → weakly hydrated. */
export const anions: readonly Ion[] = names.map(ionFrom)

/** Anions that tables name beyond these ten; they have no place in the order. */
export const furtherAnions: readonly Ion[] = furtherAnionNames.map(ionFrom)

export const cations: readonly Ion[] = cationNames.map(ionFrom)

const byFormula = new Map([...anions, ...furtherAnions].map(ion => [ion.formula, ion]))

/** An anion of the order or a further one. */
export function anionOf(formula: string): Ion | undefined {
  return byFormula.get(formula)
}

/** Place on the scale from strongly (0) to weakly hydrated; ions not on it come last. */
export function hydrationOrder(formula: string): number {
  const place = anions.findIndex(ion => ion.formula === formula)
  return place < 0 ? anions.length : place
}

/** @returns charge number of a formula such as SO4^2- (−2) or Na^+ (+1); 0 without a charge */
export function chargeOf(formula: string): number {
  const match = /\^(\d*)([+-])$/.exec(formula)
  if (!match) return 0
  const size = match[1] ? Number(match[1]) : 1
  return match[2] === '-' ? -size : size
}

/** Cuts a formula into what stands on the line, below and above it; the charge comes last, with a true minus sign. A count of waters stands on the line. */
export function formulaPieces(formula: string): FormulaPiece[] {
  const [body = '', charge] = formula.split('^')
  const pieces: FormulaPiece[] = [...body.matchAll(/([A-Za-z()]+|[·.]\d*)|(\d+)/g)].map(([text, , digits]) => digits ? { text, place: 'sub' as const } : { text })
  if (charge) pieces.push({ text: charge.replace('-', '−'), place: 'sup' })
  return pieces
}

const subscripts = '₀₁₂₃₄₅₆₇₈₉'
const superscripts: Readonly<Record<string, string>> = { '0': '⁰', '1': '¹', '2': '²', '3': '³', '4': '⁴', '5': '⁵', '6': '⁶', '7': '⁷', '8': '⁸', '9': '⁹', '+': '⁺', '−': '⁻' }

/** A formula in running text: SO4^2- → SO₄²⁻. */
export function plainFormula(formula: string): string {
  return formulaPieces(formula).map(({ text, place }) => {
    if (place === 'sub') return [...text].map(digit => subscripts[Number(digit)]).join('')
    return place === 'sup' ? [...text].map(sign => superscripts[sign] ?? sign).join('') : text
  }).join('')
}
