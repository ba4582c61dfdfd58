import { bodiesAsWritten, bodiesInLowerCase, type BodyIndex, type BodyIndexes } from './ion-lookup'
import type { Ion } from './ions'
import { isElementFormula } from './molar-mass'
import { saltFrom, type Salt } from './salts'

/** What a formula or name spells: a neutral salt, or ions in counts that do not balance, with the salt they would make. */
export interface Spelt {
  salt: Salt
  isBalanced: boolean
  /** true: the name fits more than one salt */
  isOpen?: boolean
}

interface Part {
  ion: Ion
  count: number
  isCounted: boolean
  length: number
}

const isSingle = (body: string) => /^[A-Z][a-z]?$/i.test(body)

/** Every way in which the text may begin with one of the ions. */
export function beginnings(text: string, index: BodyIndex, isLoose: boolean): Part[] {
  const parts: Part[] = []
  for (const { body, grouped, ions } of index.values()) {
    const start = text.startsWith(body) ? body : text.startsWith(grouped) ? grouped : null
    if (start === null) continue
    const digits = /^[1-9]\d*/.exec(text.slice(start.length))?.[0] ?? ''
    for (const ion of ions) {
      parts.push({ ion, count: 1, isCounted: false, length: start.length })
      if (digits && (isLoose || start === grouped || isSingle(body))) parts.push({ ion, count: Number(digits), isCounted: true, length: start.length + digits.length })
    }
  }
  return parts
}

/** The ions that the whole text may stand for. */
function wholes(text: string, index: BodyIndex, isLoose: boolean): Part[] {
  const parts: Part[] = (index.get(text)?.ions ?? []).map(ion => ({ ion, count: 1, isCounted: false, length: text.length }))
  const match = /^(?:\((.+)\)|([^()]+?|.+\)))([1-9]\d*)?$/.exec(text)
  const body = match?.[1] ?? match?.[2]
  if (body && body !== text && (isLoose || match?.[1] || isSingle(body))) {
    for (const ion of index.get(body)?.ions ?? []) parts.push({ ion, count: Number(match?.[3] || 1), isCounted: true, length: text.length })
  }
  return parts
}

function speltBy(text: string, { anions, cations }: BodyIndexes, isLoose: boolean): Spelt[] {
  const pairs = [
    ...beginnings(text, cations, isLoose).flatMap(cation => wholes(text.slice(cation.length), anions, isLoose).map(anion => [cation, anion] as const)),
    ...beginnings(text, anions, isLoose).flatMap(anion => wholes(text.slice(anion.length), cations, isLoose).map(cation => [cation, anion] as const)),
  ]
  return pairs.map(([cation, anion]) => {
    const isBalanced = !isLoose && cation.count * cation.ion.charge + anion.count * anion.ion.charge === 0
    return { salt: saltFrom(cation.ion, anion.ion), isBalanced }
  })
}

/** Balanced before unbalanced; null where two different salts remain. */
function only(found: readonly Spelt[]): Spelt | null {
  const balanced = found.filter(one => one.isBalanced)
  if (balanced.length === 0) return found[0] ?? null
  return balanced.every(({ salt }) => salt.formula === balanced[0]!.salt.formula) ? balanced[0]! : null
}

/** A formula without charges and spaces: Na2SO4, (NH4)2SO4, CH3COONa; nacl and NACL where no other salt is meant. */
export function readFormula(formula: string): Spelt | null {
  const asWritten = only(speltBy(formula, bodiesAsWritten, false))
  if (asWritten) return asWritten
  const hasCase = isElementFormula(formula) && /[a-z]/.test(formula)
  const inLowerCase = hasCase ? null : only(speltBy(formula.toLowerCase(), bodiesInLowerCase, false))
  if (inLowerCase) return inLowerCase
  const bare = formula.replace(/[()]/g, '')
  return (hasCase ? speltBy(bare, bodiesAsWritten, true) : speltBy(bare.toLowerCase(), bodiesInLowerCase, true))[0] ?? null
}
