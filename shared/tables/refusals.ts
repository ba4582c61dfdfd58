import { mostColumns, mostRows, TableError } from './types'

const thousand = (number: number) => number.toLocaleString('en-GB')

/** Header and units do not count among the rows. */
const headRows = 2

/** Refuses a table that is larger than one import takes. */
export function refuseTooLarge(rows: number, columns: number): void {
  if (rows > mostRows + headRows) {
    throw new TableError('too-many-rows', `The table has more than ${thousand(mostRows)} rows, the most one import takes. Cut it into several files, or leave out rows that are no readings.`)
  }
  if (columns > mostColumns) {
    throw new TableError('too-many-columns', `The table has ${columns} columns; one import takes ${mostColumns}. Leave out columns that are not needed, or turn the table so that readings are rows.`)
  }
}

const startsWith = (bytes: Uint8Array, signature: readonly number[], from = 0) => signature.every((byte, index) => bytes[from + index] === byte)
const ascii = (text: string) => [...text].map(letter => letter.charCodeAt(0))

const pdf = ascii('%PDF')
const compound = [0xD0, 0xCF, 0x11, 0xE0]
const zip = [0x50, 0x4B, 0x03, 0x04]
const openDocument = ascii('application/vnd.oasis.opendocument')
const notTables: readonly (readonly [string, readonly number[]])[] = [
  ['a PNG picture', [0x89, 0x50, 0x4E, 0x47]],
  ['a JPEG picture', [0xFF, 0xD8, 0xFF]],
  ['a GIF picture', ascii('GIF8')],
  ['a compressed file (gzip)', [0x1F, 0x8B, 0x08]],
  ['a compressed file (7z)', [0x37, 0x7A, 0xBC, 0xAF]],
  ['a text with formatting (RTF)', ascii('{\\rtf')],
]

/**
 * Refuses by its first bytes, whatever its name, a file that holds no table we read: PDF, OpenDocument, old Excel, pictures.
 * @throws TableError pdf, ods, old-xls, not-a-table
 */
export function refuseByMagic(bytes: Uint8Array): void {
  if (startsWith(bytes, pdf)) throw new TableError('pdf', 'This is a PDF. Export the table from where the PDF was made as CSV or XLSX, or copy the table and paste it.')
  if (startsWith(bytes, compound)) {
    throw new TableError('old-xls', 'This is an old Excel file (.xls), or one locked with a password. Open it in your spreadsheet and save it as .xlsx without a password, or as CSV.')
  }
  // The first entry of an OpenDocument file is its type, stored as plain text behind a header of 30 bytes and the name "mimetype".
  if (startsWith(bytes, zip) && startsWith(bytes, openDocument, 38)) {
    throw new TableError('ods', 'This is an OpenDocument file (.ods). Open it in your spreadsheet and save it as .xlsx or CSV.')
  }
  const other = notTables.find(([, signature]) => startsWith(bytes, signature))
  if (other) throw new TableError('not-a-table', `This is ${other[0]}, not a table. Choose a CSV, text or XLSX file.`)
}

/** Refuses a packed file where text is expected. */
export function refusePacked(bytes: Uint8Array): void {
  if (startsWith(bytes, zip)) throw new TableError('not-a-table', 'This is a packed file (ZIP), not a text. Unpack it, or give a workbook the ending .xlsx.')
}
