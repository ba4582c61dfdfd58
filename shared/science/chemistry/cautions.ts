import table from './cautions.json'
import { readSalt } from './read-salt'
import type { Salt } from './salts'

/** As data-seeds/chemistry/cautions.ts writes it from the tables there. */
export interface CautionTable {
  /** text of each hazard statement by its code */
  statements: Readonly<Record<string, string>>
  salts: readonly CautionEntry[]
}

export interface CautionEntry {
  formulas: readonly string[]
  codes: readonly string[]
  /** true: suppliers do not usually classify it as hazardous */
  isUnclassified: boolean
  handling: string
  /** how the entry was seen, such as 'from memory' */
  confidence: string
}

export interface Cautions {
  /** formulas the record speaks of: the salt itself, or relatives that share its anion or cation */
  of: readonly string[]
  isOwn: boolean
  isUnclassified: boolean
  /** sentences; may be empty */
  handling: string
  statements: readonly { code: string, text: string }[]
  confidence: string
}

interface Known {
  salt: Salt
  entry: CautionEntry
}

const { statements, salts }: CautionTable = table

const known: readonly Known[] = salts.flatMap(entry => entry.formulas.flatMap((formula) => {
  const reading = readSalt(formula)
  return reading.kind === 'salt' ? [{ salt: reading.salt, entry }] : []
}))

/** Counter-ions that add little of their own, the most telling first. */
const plainCations = ['Na^+', 'K^+']
const plainAnions = ['Cl^-', 'SO4^2-']

function firstWith(candidates: readonly Known[], role: 'anion' | 'cation', preferred: readonly string[]): Known[] {
  const hazardous = candidates.filter(({ entry }) => !entry.isUnclassified)
  const best = preferred.map(ion => hazardous.find(({ salt }) => salt[role] === ion)).find(Boolean)
  return best ? [best] : []
}

/** Salts on record that share the anion or the cation and carry a hazard with it. */
function relativesOf({ anion, cation }: Salt): Known[] {
  return [
    ...firstWith(known.filter(({ salt }) => salt.anion === anion), 'cation', plainCations),
    ...firstWith(known.filter(({ salt }) => salt.cation === cation), 'anion', plainAnions),
  ]
}

function together(found: readonly Known[], isOwn: boolean): Cautions {
  const codes = [...new Set(found.flatMap(({ entry }) => entry.codes))].sort()
  return {
    of: found.map(({ salt }) => salt.formula),
    isOwn,
    isUnclassified: found.every(({ entry }) => entry.isUnclassified),
    handling: found.map(({ entry }) => entry.handling).filter(Boolean).join(' '),
    statements: codes.map(code => ({ code, text: statements[code]! })),
    confidence: [...new Set(found.map(({ entry }) => entry.confidence))].join(', '),
  }
}

/**
 * Usual cautions of a salt, for orientation only: the safety data sheet of the product in hand decides.
 *
 * @param formula a salt however written; its water makes no difference here
 * @returns its own record, else that of relatives with its anion or cation, else null
 * @source data-seeds/chemistry/hazards.csv, h_statements.csv (UN GHS and EU CLP; each row says how it was seen)
 */
export function cautionsOf(formula: string): Cautions | null {
  const reading = readSalt(formula)
  if (reading.kind !== 'salt') return null
  const own = known.find(({ salt }) => salt.formula === reading.salt.formula)
  if (own) return together([own], true)
  const relatives = relativesOf(reading.salt)
  return relatives.length > 0 ? together(relatives, false) : null
}
