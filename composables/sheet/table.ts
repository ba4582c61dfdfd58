import { readCell } from './cell'

/** A pasted table cut into cells, with what its head said. */
export interface PastedTable {
  rows: string[][]
  /** lines left out because they hold no number: titles and units */
  headLines: number
  /** true: the head says the concentrations are in mmol/L */
  isMillimolar: boolean
}

const millimolar = /\bmM\b|mmol/

function splitLine(line: string, separator: string | RegExp): string[] {
  return line.split(separator).map(cell => cell.trim().replace(/^"(.*)"$/, '$1'))
}

/** Four comma-separated groups without a point are two numbers with decimal commas: 0,02,31,27. */
function pairDecimalCommas(line: string): string[] {
  const groups = line.split(',')
  const isPaired = groups.length === 4 && groups.every(group => /^\s*[+-]?\d+\s*$/.test(group))
  return isPaired ? [groups.slice(0, 2).join(','), groups.slice(2).join(',')] : splitLine(line, ',')
}

function splitLines(lines: readonly string[]): string[][] {
  if (lines.some(line => line.includes('\t'))) return lines.map(line => splitLine(line, '\t'))
  if (lines.some(line => line.includes(';'))) return lines.map(line => splitLine(line, ';'))
  const isSpaced = lines.some(line => /\d\s+[-+\u2212]?[\d.]/.test(line.trim()))
  if (isSpaced) return lines.map(line => line.trim().split(/\s+/))
  return lines.map(pairDecimalCommas)
}

/**
 * Cuts pasted text into cells: tabs, semicolons, commas or spaces between them, decimal points or commas inside.
 * Lines at the top without a number are the head and its units; they are left out and counted.
 */
export function readTable(text: string): PastedTable {
  const lines = text.replace(/\r\n?/g, '\n').split('\n').filter(line => line.trim() !== '')
  const rows = splitLines(lines)
  const firstNumbers = rows.findIndex(row => row.some(cell => readCell(cell).kind === 'number'))
  const headLines = firstNumbers < 0 ? 0 : firstNumbers
  return {
    rows: rows.slice(headLines),
    headLines,
    isMillimolar: lines.slice(0, headLines).some(line => millimolar.test(line)),
  }
}
