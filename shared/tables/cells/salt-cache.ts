import { readSalt, type SaltReading } from '#shared/science/chemistry/read-salt'
import { tidy } from './fold'

const known = new Map<string, SaltReading>()

/** Numbers and long remarks are no salts; looking for the nearest one would take its time. */
const noSalt: SaltReading = { kind: 'unknown', problem: 'unknown', suggestion: null }
const mayBeSalt = (text: string) => text === '0' || (text.length <= 100 && /\p{L}/u.test(text))

/** A salt however written; remembered, because tables repeat their salts. */
export function saltOf(text: string): SaltReading {
  const written = tidy(text)
  if (!mayBeSalt(written)) return noSalt
  const before = known.get(written)
  if (before) return before
  const reading = readSalt(written)
  if (known.size > 5_000) known.clear()
  known.set(written, reading)
  return reading
}

/** The formula of a salt however written; null where it is not one known salt. */
export function saltFormula(text: string): string | null {
  const reading = saltOf(text)
  return reading.kind === 'salt' ? reading.salt.formula : null
}

/** The formula of the salt that a text nearly names; null where it names one, or none. */
export function suggestedSalt(text: string): string | null {
  const reading = saltOf(text)
  return reading.kind === 'unknown' ? reading.suggestion : null
}

/** A salt stands at the beginning of a phrase, or not at all. */
const longestPhrase = 200

/** The salt that a heading, a file name or a remark names among other words; null where there is none. */
export function saltAmong(text: string): string | null {
  const parts = tidy(text.slice(0, longestPhrase)).split(/[\s_,;:/|[\]="]+/)
  // c(NaCl) holds a salt inside its brackets, Ca(NO3)2 is one with them.
  const words = [...parts, ...parts.map(part => /^[^()]*\((.+)\)$/.exec(part)?.[1] ?? '')].filter(word => word.length > 1)
  const pairs = words.slice(1).map((word, index) => `${words[index]} ${word}`)
  for (const candidate of [tidy(text.slice(0, longestPhrase)), ...pairs, ...words]) {
    const salt = candidate.length > 40 ? null : saltFormula(candidate)
    if (salt !== null) return salt
  }
  return null
}
