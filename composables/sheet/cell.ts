/** What a typed cell holds. */
export type Cell
  = | { kind: 'empty' }
    | { kind: 'number', value: number }
    | { kind: 'bad', suggestion: string | null }

const decimal = /^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d+)?$/i

/** Letters that are typed or read by a scanner in place of digits. */
const lookalikes: Record<string, string> = { 'l': '1', 'I': '1', '|': '1', 'O': '0', 'o': '0', 'S': '5', 'B': '8' }

/** True minus signs and dashes, no-break spaces and a decimal comma become what numbers are made of. */
function normalised(text: string): string {
  const plain = text.replace(/[\u2212\u2012\u2013]/g, '-').replace(/[\u00A0\u2009\u202F]/g, ' ').trim()
  return /^[^.,]*,[^.,]*$/.test(plain) ? plain.replace(',', '.') : plain
}

function numberOf(text: string): number | null {
  const value = decimal.test(text) ? Number(text) : NaN
  return Number.isFinite(value) ? value : null
}

/** The number that was most likely meant, as it would be typed; null when there is no one guess. */
function guess(text: string): string | null {
  const digits = text.replace(/[lI|OoSB](?=[\d.,]|$)|(?<=[\d.,])[lI|OoSB]/g, letter => lookalikes[letter] ?? letter)
  const withoutUnit = digits.replace(/\s*(°\s*C|°|K|M|mol\s*\/?\s*L.*)$/, '')
  const withoutGaps = withoutUnit.replace(/(?<=\d)[\s'](?=\d)/g, '')
  const onePoint = withoutGaps.replace(/([.,])[.,]+/g, '$1')
  const candidate = normalised(onePoint)
  const thousands = /^[+-]?\d{1,3}(,\d{3})+\.\d+$/.test(onePoint) ? onePoint.replaceAll(',', '') : candidate
  return numberOf(thousands) === null || thousands === text ? null : thousands
}

/** Reads a cell: a decimal point or comma, a true minus sign and powers of ten are understood. */
export function readCell(text: string): Cell {
  const plain = normalised(text)
  if (plain === '') return { kind: 'empty' }
  const value = numberOf(plain)
  return value === null ? { kind: 'bad', suggestion: guess(text.trim()) } : { kind: 'number', value }
}
