import { TableError, type Grid, type TableChoices } from '../types'

type Encoding = NonNullable<Grid['encoding']>

const sampleLength = 4_096

/** Text in UTF-16 has a zero in every second byte of its Latin letters and digits; other text has none. */
function zeroBytes(bytes: Uint8Array): { even: number, odd: number, pairs: number } {
  const end = Math.min(bytes.length, sampleLength) & ~1
  let even = 0
  let odd = 0
  for (let index = 0; index < end; index += 2) {
    if (bytes[index] === 0) even++
    if (bytes[index + 1] === 0) odd++
  }
  return { even, odd, pairs: end / 2 }
}

function markedEncoding(bytes: Uint8Array): Encoding | null {
  if (bytes[0] === 0xEF && bytes[1] === 0xBB && bytes[2] === 0xBF) return 'utf-8'
  if (bytes[0] === 0xFF && bytes[1] === 0xFE) return 'utf-16le'
  if (bytes[0] === 0xFE && bytes[1] === 0xFF) return 'utf-16be'
  return null
}

const notText = () => new TableError('not-a-table', 'This file holds no text that could be a table. Export the table as CSV, text or XLSX and choose that file.')

function unmarkedEncoding(bytes: Uint8Array): Encoding | null {
  const { even, odd, pairs } = zeroBytes(bytes)
  if (even + odd === 0) return null
  if (odd > pairs * 0.4 && even < pairs * 0.1) return 'utf-16le'
  if (even > pairs * 0.4 && odd < pairs * 0.1) return 'utf-16be'
  throw notText()
}

/** What Windows-1252 has where Latin-1 has control characters, from 0x80; some decoders take one for the other. */
const windowsOnly = '€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008DŽ\u008F\u0090‘’“”•–—˜™š›œ\u009DžŸ'

function decodeAs(bytes: Uint8Array, encoding: Encoding): string {
  if (encoding === 'windows-1252') return new TextDecoder(encoding).decode(bytes).replace(/[\u0080-\u009F]/g, letter => windowsOnly[letter.charCodeAt(0) - 0x80] ?? letter)
  // An odd last byte of UTF-16 is the half of a character that was cut off.
  const whole = encoding.startsWith('utf-16') ? bytes.subarray(0, bytes.length & ~1) : bytes
  return new TextDecoder(encoding, { fatal: true }).decode(whole)
}

/** Control characters other than tabs and line ends do not occur in tables. */
function isBinary(text: string): boolean {
  const sample = text.slice(0, sampleLength)
  // eslint-disable-next-line no-control-regex -- these are the characters looked for
  const controls = sample.match(/[\u0000-\u0008\u000E-\u001A\u001C-\u001F\u007F\uFFFE\uFFFF]/g)?.length ?? 0
  return controls > sample.length * 0.01
}

/** Some instruments save a web page under the name of a spreadsheet. */
function refuseMarkup(text: string): void {
  if (!/^\uFEFF?\s{0,100}<(?:!doctype|html|\?xml|table)\b/i.test(text.slice(0, 200))) return
  throw new TableError('not-a-table', 'This is a web page or XML, whatever its name ends in. Open it in your spreadsheet and save it as .xlsx or CSV.')
}

function decodeChosen(bytes: Uint8Array, encoding: Encoding): string {
  try {
    return decodeAs(bytes, encoding)
  }
  catch {
    throw new TableError('wrong-encoding', `The file is not written in ${encoding.toUpperCase()}. Choose another encoding, or leave the choice to us.`)
  }
}

function recognised(bytes: Uint8Array): { text: string, encoding: Encoding } {
  const encoding = markedEncoding(bytes) ?? unmarkedEncoding(bytes) ?? 'utf-8'
  try {
    return { text: decodeAs(bytes, encoding), encoding }
  }
  catch {
    // Every byte is a character of Windows-1252, so it comes last.
    return { text: decodeAs(bytes, 'windows-1252'), encoding: 'windows-1252' }
  }
}

/**
 * Bytes as text: by byte order mark, by the zeros of UTF-16, as UTF-8 where that holds, else as Windows-1252.
 * @throws TableError not-a-table, wrong-encoding
 */
export function decodeText(bytes: Uint8Array, choice: TableChoices['encoding']): { text: string, encoding: Encoding } {
  const result = choice ? { text: decodeChosen(bytes, choice), encoding: choice } : recognised(bytes)
  if (isBinary(result.text)) throw notText()
  refuseMarkup(result.text)
  return result
}
