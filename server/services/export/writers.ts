import writeSheets from 'write-excel-file/node'
import type { ConstantLine, Table, Value } from './tables'

/** A text that a spreadsheet would run stays a text: an apostrophe before it, which an import takes off again. */
export function harmless(value: Value): Value {
  return typeof value === 'string' && /^'*[=+\-@\t\r]/.test(value) ? `'${value}` : value
}

function csvCell(value: Value): string {
  const text = value === null ? '' : String(harmless(value))
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}

/** RFC 4180, with remark lines above the headings. Numbers are the shortest text that gives the same double back. */
export function csv(remarks: readonly string[], { headings, rows }: Table): string {
  const lines = [...remarks.map(remark => csvCell(`# ${remark}`)), ...[headings, ...rows].map(row => row.map(csvCell).join(','))]
  return `${lines.join('\r\n')}\r\n`
}

/** A workbook of named sheets; the remarks stand above each. */
export async function workbook(remarks: readonly string[], sheets: Readonly<Record<string, Table>>): Promise<Buffer> {
  const cell = (value: Value) => value === null ? null : typeof value === 'number' ? { value, type: Number } : { value: String(harmless(value)), type: String }
  const pages = Object.entries(sheets).map(([sheet, { headings, rows }]) => ({
    sheet,
    data: [...remarks.map(remark => [cell(`# ${remark}`)]), headings.map(heading => ({ value: heading, type: String, fontWeight: 'bold' as const })), ...rows.map(row => row.map(cell))],
  }))
  return await (await writeSheets(pages)).toBuffer()
}

const columns = ['lab', 'campaign', 'salt', 'revision', 'constant', 'value', 'unit', '95 % interval'] as const

function printedRow({ one, name, printed, unit, interval }: ConstantLine): string[] {
  return [one.lab, one.campaign, one.salt, String(one.revision), name, printed, unit, interval]
}

export function markdown(remarks: readonly string[], lines: readonly ConstantLine[]): string {
  const row = (cells: readonly string[]) => `| ${cells.map(text => text.replace(/[\\|]/g, '\\$&').replace(/[\r\n]+/g, ' ')).join(' | ')} |`
  return [...remarks, '', row(columns), row(columns.map(() => '---')), ...lines.map(line => row(printedRow(line)))].join('\n') + '\n'
}

const latexWords: Readonly<Record<string, string>> = {
  '\\': '\\textbackslash{}', '{': '\\{', '}': '\\}', '%': '\\%', '&': '\\&', '_': '\\_', '#': '\\#', '$': '\\$', '^': '\\textasciicircum{}', '~': '\\textasciitilde{}',
  '−': '$-$', '°': '$^\\circ$', '×': '$\\times$', '—': '---',
}
const raised: Readonly<Record<string, string>> = { '⁻': '-', '⁰': '0', '¹': '1', '²': '2', '³': '3', '⁴': '4', '⁵': '5', '⁶': '6', '⁷': '7', '⁸': '8', '⁹': '9' }

/** Text that LaTeX prints as it stands; raised digits become exponents. */
export function latexText(text: string): string {
  return text.replace(/[⁻⁰¹²³⁴-⁹]+|[\\{}%&_#$^~−°×—]/g, found => latexWords[found] ?? `$^{${[...found].map(digit => raised[digit]).join('')}}$`)
}

/** A plain tabular; needs no package. */
export function latex(remarks: readonly string[], lines: readonly ConstantLine[]): string {
  const row = (cells: readonly string[]) => `${cells.map(latexText).join(' & ')} \\\\`
  return [
    ...remarks.map(remark => `% ${remark.replace(/[\r\n]+/g, ' ')}`), '\\begin{tabular}{lllrlrll}', '\\hline', row(columns), '\\hline', ...lines.map(line => row(printedRow(line))), '\\hline', '\\end{tabular}',
  ].join('\n') + '\n'
}
