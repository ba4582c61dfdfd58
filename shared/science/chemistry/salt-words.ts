import { anionsByName, bodiesAsWritten, cationsByName, nameKey, type NamedIon } from './ion-lookup'
import { anionOf, type Ion } from './ions'
import { beginnings, type Spelt } from './salt-formulas'
import { saltFrom } from './salts'

const connectors = /\b(?:de|of|av|von)\s+|\bd['’]\s*|(?<=o\s)di\s+/gi
const trivial: Readonly<Record<string, string>> = { tablesalt: 'sodiumchloride', commonsalt: 'sodiumchloride', kochsalz: 'sodiumchloride', bordsalt: 'sodiumchloride' }

/** A salt's name as it is looked up. */
export function saltKey(name: string): string {
  const key = nameKey(name.replace(connectors, ''))
  return trivial[key] ?? key
}

/** 'disodium phosphate' is the hydrogen phosphate: what the counted cations leave open is hydrogen. */
function acidSalt(cations: number, { formula, charge }: Ion): Ion | undefined {
  const hydrogens = -charge - cations
  const [body] = formula.split('^')
  return hydrogens > 0 ? anionOf(`H${hydrogens > 1 ? hydrogens : ''}${body}^${cations > 1 ? cations : ''}-`) : undefined
}

function isFitting(said: number | null, count: number): boolean {
  return said === null || said === count
}

/** The salt of two named ions, where the counts in the names agree with it. */
export function speltByNames(cation: NamedIon, anion: NamedIon): Spelt {
  const acid = cation.count && cation.ion.charge === 1 && anion.count === null ? acidSalt(cation.count, anion.ion) : undefined
  const salt = saltFrom(cation.ion, acid ?? anion.ion)
  // Suppliers sell all three phosphates of sodium as 'sodium phosphate'.
  const isOpen = salt.anion === 'PO4^3-' && cation.ion.charge === 1 && cation.count === null
  return { salt, isOpen, isBalanced: isFitting(cation.count, salt.cationCount) && isFitting(anion.count, salt.anionCount) }
}

function withCharge(key: string): NamedIon | undefined {
  const found = cationsByName.get(key)
  if (found || !key.includes('#')) return found
  const [, name = '', charge] = /^(.+)#(\d)$/.exec(key) ?? []
  const named = cationsByName.get(name)
  return named && named.ion.charge === Number(charge) ? named : undefined
}

const basicities: Readonly<Record<string, number>> = { monobasic: 1, dibasic: 2, tribasic: 3 }

/** A name in English, German, Norwegian, French, Spanish or Italian, cation first or last. */
export function readName(key: string): Spelt | null {
  const basicity = Object.keys(basicities).find(word => key.includes(word))
  return basicity ? readIons(key.replace(basicity, ''), basicities[basicity]!) : readIons(key, null)
}

function readIons(key: string, cationCount: number | null): Spelt | null {
  let unbalanced: Spelt | null = null
  for (let cut = 3; cut < key.length - 2; cut++) {
    const [front, back] = [key.slice(0, cut), key.slice(cut)]
    const cation = withCharge(front) ?? withCharge(back)
    const anion = cation && (anionsByName.get(back) ?? anionsByName.get(front))
    if (!anion) continue
    const spelt = speltByNames({ ion: cation.ion, count: cationCount ?? cation.count }, anion)
    if (spelt.isBalanced) return spelt
    unbalanced ??= spelt
  }
  return unbalanced
}

/** Half formula, half name: Na sulfate, Na3citrate, K-thiocyanate, sodium SCN. */
export function readSymbolAndName(text: string): Spelt | null {
  for (const { ion, count, isCounted, length } of beginnings(text, bodiesAsWritten.cations, false)) {
    const anion = anionsByName.get(nameKey(text.slice(length)))
    if (anion) return speltByNames({ ion, count: isCounted ? count : null }, anion)
  }
  const [, name = '', formula = ''] = /^([a-z]+)[\s-]+(\S+)$/i.exec(text) ?? []
  const cation = cationsByName.get(name.toLowerCase())
  const [anion] = bodiesAsWritten.anions.get(formula)?.ions ?? []
  return cation && anion ? speltByNames(cation, { ion: anion, count: null }) : null
}
