import { anionSpellings, cationSpellings, endings, type Spelling } from './ion-spellings'
import { anions, cations, furtherAnions, type Ion } from './ions'

/** An ion as a name gives it; `count` where the name says how many, as in 'disodium'. */
export interface NamedIon {
  ion: Ion
  count: number | null
}

const counts: Readonly<Record<string, number>> = { mono: 1, di: 2, bis: 2, tri: 3, tris: 3, tetra: 4 }

const allAnions: readonly Ion[] = [...anions, ...furtherAnions]

/** A name as it is looked up: lower case, no spaces; an oxidation number in parentheses becomes '#2'. */
export function nameKey(name: string): string {
  return name.toLowerCase().replace(/\((i{1,3})\)/g, (_, roman: string) => `#${roman.length}`).replace(/[\s'’,-]/g, '')
}

function namesOf({ name }: Ion, { stems = '', words = '' }: Spelling): string[] {
  const key = nameKey(name)
  const ending = Object.keys(endings).find(one => key.endsWith(one))
  const plain = [key, ...words.split(' ').filter(Boolean)]
  if (!ending) return plain
  const all = [key.slice(0, -ending.length), ...stems.split(' ').filter(Boolean)]
  return [...plain, ...all.flatMap(stem => endings[ending]!.map(end => stem + end))]
}

function uncountedNames(ions: readonly Ion[], spellings: Readonly<Record<string, Spelling>>): Map<string, NamedIon> {
  const index = new Map<string, NamedIon>()
  for (const ion of ions) {
    for (const name of namesOf(ion, spellings[ion.formula] ?? {})) if (!index.has(name)) index.set(name, { ion, count: null })
  }
  return index
}

function withCounts(uncounted: ReadonlyMap<string, NamedIon>): Map<string, NamedIon> {
  const index = new Map(uncounted)
  // A name that starts like a count is a name first: dihydrogen phosphate, triiodide.
  for (const [name, { ion }] of uncounted) {
    for (const [prefix, count] of Object.entries(counts)) {
      if (!index.has(prefix + name)) index.set(prefix + name, { ion, count })
    }
  }
  return index
}

function bodiesOf({ formula }: Ion, { bodies = '' }: Spelling): string[] {
  return [formula.split('^')[0]!, ...bodies.split(' ').filter(Boolean)]
}

/** A formula without charge and the ions it may stand for: iron has two. */
export interface Body {
  body: string
  grouped: string
  ions: Ion[]
}
export type BodyIndex = ReadonlyMap<string, Body>

function bodyIndex(ions: readonly Ion[], spellings: Readonly<Record<string, Spelling>>, change: (body: string) => string): BodyIndex {
  const index = new Map<string, Body>()
  for (const ion of ions) {
    for (const body of bodiesOf(ion, spellings[ion.formula] ?? {}).map(change)) {
      const known = index.get(body)
      if (known) known.ions.push(ion)
      else index.set(body, { body, grouped: `(${body})`, ions: [ion] })
    }
  }
  return index
}

export const uncountedAnions: ReadonlyMap<string, NamedIon> = uncountedNames(allAnions, anionSpellings)
export const uncountedCations: ReadonlyMap<string, NamedIon> = uncountedNames(cations, cationSpellings)
export const anionsByName = withCounts(uncountedAnions)
export const cationsByName = withCounts(uncountedCations)

export interface BodyIndexes {
  anions: BodyIndex
  cations: BodyIndex
}

const asWritten = (body: string) => body
const inLowerCase = (body: string) => body.toLowerCase()

export const bodiesAsWritten: BodyIndexes = { anions: bodyIndex(allAnions, anionSpellings, asWritten), cations: bodyIndex(cations, cationSpellings, asWritten) }
export const bodiesInLowerCase: BodyIndexes = { anions: bodyIndex(allAnions, anionSpellings, inLowerCase), cations: bodyIndex(cations, cationSpellings, inLowerCase) }

/** Every salt of the tables, common ones first. */
export const ionPairs: readonly (readonly [cation: Ion, anion: Ion])[] = allAnions.flatMap(anion => cations.map(cation => [cation, anion] as const))
