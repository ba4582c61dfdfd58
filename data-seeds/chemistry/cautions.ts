import type { CautionTable } from '#shared/science/chemistry/cautions'
import { readCsv, type CsvRow } from './csv'

/** 'As perchlorates; strong desiccant.' repeats what another row says. */
const families: Readonly<Record<string, string>> = {
  'perchlorates': 'NaClO4', 'thiocyanates': 'NaSCN', 'sodium thiocyanate': 'NaSCN', 'fluorides': 'NaF', 'sodium cyanide': 'NaCN',
}

const capitalized = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)

function handlingOf(row: CsvRow, all: readonly CsvRow[]): string {
  const handling = row.handling_caution === '-' ? '' : row.handling_caution!
  const [, family, rest = ''] = /^As ([a-z ]+)[.;]\s*(.*)$/.exec(handling) ?? []
  if (!family) return handling
  const shared = all.find(other => other.formula === families[family])
  if (!shared) throw new Error(`${row.formula}: no row says what holds for ${family}`)
  return [shared.handling_caution!, capitalized(rest)].filter(Boolean).join(' ')
}

/** What the browser needs of hazards.csv and h_statements.csv: salts only, each caution in full. */
export function cautionTable(hazards: string, statements: string): CautionTable {
  const rows = readCsv(hazards).filter(({ substance }) => substance !== 'GENERAL' && !substance!.includes('monomer'))
  const texts = readCsv(statements).map(({ code, text }) => [code!, text!.replace(/ \(EU (?:supplement|form)[^)]*\)/, '')])
  return {
    statements: Object.fromEntries(texts),
    salts: rows.map(row => ({
      formulas: row.formula!.split(', '),
      codes: /^(?:EU)?H\d/.test(row.h_codes!) ? row.h_codes!.split('; ') : [],
      isUnclassified: row.h_codes!.startsWith('not classified'),
      handling: handlingOf(row, rows),
      confidence: row.confidence!,
    })),
  }
}
