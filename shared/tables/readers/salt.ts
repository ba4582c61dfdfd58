import { fault, nothing, taken, undecided, type Found, type ReadCell } from './finding'
import { saltOf } from '../cells/salt-cache'

/** The formula of the anhydrous salt a row names, or null inside for a blank. */
export interface NamedSalt { salt: string | null }

function unknownSalt(column: number, text: string, problem: 'unknown' | 'misspelt' | 'unbalanced', suggestion: string | null): Found<NamedSalt> {
  const codes = { unknown: 'unknown-salt', misspelt: 'misspelt-salt', unbalanced: 'unbalanced-salt' } as const
  const message = problem === 'unbalanced' ? `Charges do not balance: ${text}` : `Salt not known: ${text}`
  if (suggestion === null) return { value: null, findings: [fault(column, codes[problem], message, 'Type its formula, such as Na2SO4, or its name, or leave the row out.')] }
  const detail = problem === 'unbalanced' ? `In ${suggestion} they do.` : `The nearest that is known is ${suggestion}.`
  return { value: null, findings: [undecided(column, codes[problem], message, `${detail} Agree, or type the salt.`, suggestion)] }
}

/** The salt of a row. An empty cell gives nothing and no finding. */
export function readSaltCell(cell: ReadCell, column: number): Found<NamedSalt> {
  const text = cell.text.trim()
  if (text === '') return nothing
  const reading = saltOf(text)
  if (reading.kind === 'salt') return { value: { salt: reading.salt.formula }, findings: [] }
  if (reading.kind === 'blank') return { value: { salt: null }, findings: [] }
  const bare = text.replace(/^[=+@'-]\s*/, '')
  const behindSign = bare === text ? reading : saltOf(bare)
  if (behindSign.kind !== 'unknown') {
    return {
      value: { salt: behindSign.kind === 'salt' ? behindSign.salt.formula : null },
      findings: [taken(column, 'formula-like', `Reads as ${bare}`, 'The cell begins like a formula. Formulas are never run; the salt behind the sign is taken.')],
    }
  }
  return unknownSalt(column, text.slice(0, 60), behindSign.problem, behindSign.suggestion)
}
