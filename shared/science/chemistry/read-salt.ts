import { anionsByName, bodiesAsWritten, bodiesInLowerCase } from './ion-lookup'
import type { Ion } from './ions'
import { readFormula, type Spelt } from './salt-formulas'
import { guessSalt } from './salt-spelling'
import { isBlank, tidy, withoutCrystalWater } from './salt-text'
import { readName, readSymbolAndName, saltKey } from './salt-words'
import { sodiumSaltOf, type Salt } from './salts'

/**
 * What a text says about a salt. `hydrate` counts waters a formula unit. A suggestion is a formula to be agreed to:
 * unknown · also an anion alone, a name that fits several salts, or water that is not counted; misspelt · at most two
 * edits from one known salt; unbalanced · the charges of the counts written do not cancel, or a parenthesis is missing.
 */
export type SaltReading = Readonly<
  | { kind: 'salt', salt: Salt, hydrate: number }
  | { kind: 'blank' }
  | { kind: 'unknown', problem: 'unknown' | 'misspelt' | 'unbalanced', suggestion: string | null }
>

/** Longer texts are remarks, not salts. */
const longestText = 160

const unknown: SaltReading = { kind: 'unknown', problem: 'unknown', suggestion: null }

/** Na2SO4·10H2O; a suggestion keeps the water that was written. */
export function hydrateFormula(formula: string, waters: number): string {
  return waters > 0 ? `${formula}·${waters === 1 ? '' : waters}H2O` : formula
}

function withoutCharges(formula: string): string {
  return formula.replace(/\s/g, '').replace(/\^\d*[+-]/g, '')
}

/** Na+ SCN-: single charges without a caret. */
function spellChargedIons(text: string): Spelt | null {
  return text.includes('+') && text.includes('-') ? readFormula(text.replace(/[\s+-]/g, '')) : null
}

function spell(text: string): Spelt | null {
  return readFormula(withoutCharges(text)) ?? spellChargedIons(text) ?? readName(saltKey(text)) ?? readSymbolAndName(text)
}

function loneAnion(text: string): Ion | undefined {
  const formula = withoutCharges(text)
  for (const body of [formula, formula.replace(/-$/, ''), formula.replace(/\d-$/, '')]) {
    const found = bodiesAsWritten.anions.get(body) ?? bodiesInLowerCase.anions.get(body.toLowerCase())
    if (found) return found.ions[0]
  }
  return anionsByName.get(saltKey(text).replace(/ions?$/, ''))?.ion
}

/** Where the parenthesis opens that the last sign closes; −1 without one. */
function lastOpening(text: string): number {
  let depth = 0
  for (let place = text.length - 1; place >= 0; place--) {
    if (text[place] === ')') depth++
    else if (text[place] === '(') depth--
    if (depth === 0) return text[place] === '(' ? place : -1
  }
  return -1
}

/** Sodium sulfate (Na2SO4): twice the same salt. */
function twice(text: string): SaltReading | null {
  const opening = lastOpening(text)
  if (opening < 1) return null
  const [one, other] = [readTidied(text.slice(0, opening).trim()), readTidied(text.slice(opening + 1, -1))]
  if (one.kind !== 'salt' || other.kind !== 'salt' || one.salt.formula !== other.salt.formula) return null
  return { ...one, hydrate: Math.max(one.hydrate, other.hydrate) }
}

function readTidied(text: string): SaltReading {
  const { rest, waters } = withoutCrystalWater(text)
  const suggest = (problem: 'unknown' | 'misspelt' | 'unbalanced', salt: Salt): SaltReading =>
    ({ kind: 'unknown', problem, suggestion: hydrateFormula(salt.formula, waters ?? 0) })
  const spelt = spell(rest)
  if (spelt) {
    if (!spelt.isBalanced) return suggest('unbalanced', spelt.salt)
    return waters === null || spelt.isOpen ? suggest('unknown', spelt.salt) : { kind: 'salt', salt: spelt.salt, hydrate: waters }
  }
  const anion = loneAnion(rest)
  if (anion) return suggest('unknown', sodiumSaltOf(anion))
  const guess = guessSalt(withoutCharges(rest), saltKey(rest), rest.toLowerCase().split(/[\s-]+/))
  return guess ? suggest('misspelt', guess) : unknown
}

function read(text: string): SaltReading {
  const tidied = tidy(text)
  if (tidied === '') return unknown
  if (isBlank(tidied)) return { kind: 'blank' }
  return twice(tidied) ?? readTidied(tidied)
}

/** A table names few salts many times; the memory is emptied when full. */
const mostRemembered = 500
const remembered = new Map<string, SaltReading>()

/**
 * Reads a salt however written: Na2SO4, Na₂SO₄, sodium sulphate, Natriumsulfat-Decahydrat, sulfate de sodium, NaClO4 x H2O.
 * A doubtful text is never taken as a salt: it comes back unknown, with a suggestion where there is one.
 */
export function readSalt(text: string): SaltReading {
  if (text.length > longestText) return unknown
  const known = remembered.get(text)
  if (known) return known
  const reading = read(text)
  if (remembered.size >= mostRemembered) remembered.clear()
  remembered.set(text, reading)
  return reading
}
