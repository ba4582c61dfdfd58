import type { QuantityName } from '#shared/science/chemistry/units'

/** Symbols and names of the fitted and derived quantities, with the marks of richPieces.ts. */
const symbols: Partial<Record<QuantityName, string>> = {
  T0: '*T*~0~', c: '*c*', q: '*q*', Bmax: '*B*~max~', K: '*K*', h: '*h*', Kd: '*K*~d~', BmaxK: '*B*~max~*K*',
  initialSlope: 'initial slope', curvature: 'curvature', plateau: 'plateau',
  maximumConcentration: '[M] of highest point', maximumShift: 'highest shift',
  minimumConcentration: '[M] of lowest point', minimumShift: 'lowest shift', crossoverConcentration: '[M] of no shift',
}

export function quantitySymbol(name: string): string {
  return symbols[name as QuantityName] ?? `*${name}*`
}

const raised: Record<string, string> = { '⁻': '−', '⁺': '+', '⁰': '0', '¹': '1', '²': '2', '³': '3', '⁴': '4', '⁵': '5', '⁶': '6', '⁷': '7', '⁸': '8', '⁹': '9' }

/** A unit with its exponents marked for setting: K M⁻¹ → K M^−1^. The typefaces have no raised digits of their own. */
export function unitMarkup(unit: string): string {
  return unit.replace(/[⁻⁺⁰¹²³⁴-⁹]+/g, run => `^${[...run].map(letter => raised[letter] ?? letter).join('')}^`)
}
