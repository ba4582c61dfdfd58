import { editDistance, lettersOf, mayBeWithin } from './edit-distance'
import { anionsByName, cationsByName, ionPairs, uncountedAnions, uncountedCations, type NamedIon } from './ion-lookup'
import { isElementFormula } from './molar-mass'
import { saltFrom, type Salt } from './salts'
import { speltByNames } from './salt-words'

interface Guess {
  salt: Salt
  edits: number
}

/** Signs that look alike count half an edit. */
const lookalikes: Readonly<Record<string, string>> = { 1: 'l', i: 'l', 0: 'o', 5: 's', 8: 'b' }
const shapeOf = (sign: string) => lookalikes[sign] ?? sign
const confusion = (a: string, b: string) => shapeOf(a) === shapeOf(b) ? 0.5 : 1
const shapesOf = (word: string) => lettersOf([...word].map(shapeOf).join(''))

const elementsOf = (formula: string) => [...new Set(formula.match(/[A-Z][a-z]?/g))].sort().join(' ')

const knownFormulas = ionPairs.map(([cation, anion]) => {
  const { formula } = saltFrom(cation, anion)
  const word = formula.toLowerCase()
  return { cation, anion, word, shapes: shapesOf(word), elements: elementsOf(formula) }
})

const knownNames = (names: ReadonlyMap<string, NamedIon>) => [...names].map(([word, named]) => ({ word, named, letters: lettersOf(word) }))
const knownAnions = knownNames(uncountedAnions)
const knownCations = knownNames(uncountedCations)

/** A short word is not stretched: 'NaN' is no iodide. */
const formulaLimit = (length: number) => length < 4 ? 0.5 : length < 8 ? 1 : 2
const nameLimit = (length: number) => length < 5 ? 0 : length < 7 ? 1 : 2

/** The nearest one; null where two salts are as near as each other. */
function nearest(guesses: readonly Guess[]): Salt | null {
  const least = Math.min(...guesses.map(({ edits }) => edits))
  const near = guesses.filter(({ edits }) => edits === least)
  return near.length > 0 && near.every(({ salt }) => salt.formula === near[0]!.salt.formula) ? near[0]!.salt : null
}

/** A formula with its signs swapped or mistaken: NaSNC, NaCI, Na2S04. A formula of other elements is another substance and stays. */
function guessFormula(formula: string): Salt | null {
  if (!/^[A-Za-z(][A-Za-z0-9()]{2,19}$/.test(formula)) return null
  const word = formula.toLowerCase()
  const limit = formulaLimit(word.length)
  const shapes = shapesOf(word)
  const elements = isElementFormula(formula) ? elementsOf(formula) : null
  const guesses: Guess[] = []
  for (const known of knownFormulas) {
    if (Math.abs(known.word.length - word.length) > limit || !mayBeWithin(Math.floor(limit), shapes, known.shapes)) continue
    const edits = editDistance(word, known.word, limit, confusion)
    const isOther = elements !== null && edits !== 0.5 && elements !== known.elements
    if (edits <= limit && !isOther) guesses.push({ salt: saltFrom(known.cation, known.anion), edits })
  }
  return nearest(guesses)
}

interface NearIon {
  named: NamedIon
  edits: number
}

function nearIons(word: string, index: ReadonlyMap<string, NamedIon>, known: typeof knownAnions): NearIon[] {
  const exact = index.get(word)
  if (exact) return [{ named: exact, edits: 0 }]
  const limit = nameLimit(word.length)
  const letters = lettersOf(word)
  return known.flatMap(({ word: name, named, letters: others }) => {
    if (Math.abs(name.length - word.length) > limit || !mayBeWithin(limit, letters, others)) return []
    const edits = editDistance(word, name, limit)
    return edits <= limit ? [{ named, edits }] : []
  })
}

/** Where one half is spelt right the other is looked for; two halves with a fault each must stand as two words. */
function cutsOf(key: string, words: readonly string[]): number[] {
  const cuts = new Set<number>(words.length > 1 ? [words[0]!.length, key.length - words.at(-1)!.length] : [])
  for (let cut = 3; cut < key.length - 2; cut++) {
    const [front, back] = [key.slice(0, cut), key.slice(cut)]
    if (cationsByName.has(front) || cationsByName.has(back) || anionsByName.has(front) || anionsByName.has(back)) cuts.add(cut)
  }
  return [...cuts]
}

function guessesOf(cationWord: string, anionWord: string): Guess[] {
  const cations = nearIons(cationWord, cationsByName, knownCations)
  if (cations.length === 0) return []
  return nearIons(anionWord, anionsByName, knownAnions).flatMap(anion => cations.map(cation => ({
    salt: speltByNames(cation.named, anion.named).salt,
    edits: cation.edits + anion.edits,
  }))).filter(({ edits }) => edits <= 2)
}

function guessName(key: string, words: readonly string[]): Salt | null {
  if (!/^[a-z#0-9]{6,40}$/.test(key)) return null
  return nearest(cutsOf(key, words).flatMap((cut) => {
    const [front, back] = [key.slice(0, cut), key.slice(cut)]
    return [...guessesOf(front, back), ...guessesOf(back, front)]
  }))
}

/**
 * The salt that a misspelt formula or name most likely means, at most two edits away; null where none or several are as near.
 *
 * @param formula as written, without charges and spaces
 * @param key as `saltKey` gives it
 * @param words the name's words in lower case
 */
export function guessSalt(formula: string, key: string, words: readonly string[]): Salt | null {
  return guessFormula(formula) ?? guessName(key, words)
}
