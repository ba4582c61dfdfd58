import { decimalOf, type Decimal } from './decimal'

/** The mark before the decimals; both: each cell says its own. */
export type DecimalMark = '.' | ',' | 'both'

export interface WrittenNumber extends Decimal {
  mark: '.' | ',' | null
  /** true: thousands were set apart */
  isGrouped: boolean
}

const plain = /^-?(?:\d+|\d*\.\d+)$/
const general = /^([+-]?)((?:\d[\d.,'’ ]*)|(?:[.,]\d+))(?:\s*(?:[eE]|[x×·*] ?10 ?\^? ?)([+-]?\d{1,3}))?$/
const groupedBySpace = /^\d{1,3}(?:[ '’]\d{3})+(?:[.,]\d+)?$/
const doubtful = /^[1-9]\d{0,2}([.,])\d{3}$/

function built(sign: string, digits: string, exponent: string | undefined, mark: '.' | ',' | null, isGrouped: boolean): WrittenNumber {
  const body = digits.startsWith('.') ? `0${digits}` : digits.replace(/\.$/, '')
  return { ...decimalOf(`${sign === '-' ? '-' : ''}${body}${exponent === undefined ? '' : `e${Number(exponent)}`}`), mark, isGrouped }
}

const count = (text: string, mark: string) => text.split(mark).length - 1

/** Digits with a point before the decimals, or null where the marks contradict each other. */
function withPoint(body: string, decimal: DecimalMark, mayGroup: boolean): { digits: string, mark: '.' | ',' | null, isGrouped: boolean } | null {
  if (/[ '’]/.test(body)) {
    if (!groupedBySpace.test(body)) return null
    const digits = body.replace(/[ '’]/g, '')
    return { digits: digits.replace(',', '.'), mark: digits.includes(',') ? ',' : digits.includes('.') ? '.' : null, isGrouped: true }
  }
  const [dots, commas] = [count(body, '.'), count(body, ',')]
  if (dots + commas === 0) return { digits: body, mark: null, isGrouped: false }
  if (dots > 0 && commas > 0) {
    const mark = body.lastIndexOf('.') > body.lastIndexOf(',') ? '.' : ','
    const other = mark === '.' ? ',' : '.'
    const [whole = '', fraction = ''] = body.split(mark)
    if (count(body, mark) > 1 || !isGroupedBy(whole, other)) return null
    return { digits: `${whole.replaceAll(other, '')}.${fraction}`, mark, isGrouped: true }
  }
  const mark = dots > 0 ? '.' : ','
  if (dots + commas > 1) return isGroupedBy(body, mark) ? { digits: body.replaceAll(mark, ''), mark: null, isGrouped: true } : null
  const isThousands = mayGroup && decimal !== mark && decimal !== 'both' && doubtful.test(body)
  return isThousands ? { digits: body.replace(mark, ''), mark: null, isGrouped: true } : { digits: body.replace(',', '.'), mark, isGrouped: false }
}

function isGroupedBy(whole: string, mark: string): boolean {
  const [head = '', ...groups] = whole.split(mark)
  return groups.length > 0 && /^\d{1,3}$/.test(head) && groups.every(group => /^\d{3}$/.test(group))
}

/**
 * A number as people write it: either decimal mark, thousands set apart by space, apostrophe, point or comma, powers of ten.
 * @param text tidied
 * @param mayGroup whether 1,234 may be one thousand and more; only large quantities are
 */
export function readNumber(text: string, decimal: DecimalMark, mayGroup: boolean): WrittenNumber | null {
  const number = readAny(text, decimal, mayGroup)
  return number && Number.isFinite(number.value) ? number : null
}

function readAny(text: string, decimal: DecimalMark, mayGroup: boolean): WrittenNumber | null {
  if (plain.test(text) && !(decimal === ',' && mayGroup && doubtful.test(text))) {
    // Most cells of a large table pass here.
    const point = text.indexOf('.')
    return { value: Number(text), text, decimals: point < 0 ? 0 : text.length - point - 1, mark: point < 0 ? null : '.', isGrouped: false }
  }
  const match = general.exec(text)
  if (!match) return null
  const [, sign = '', body = '', exponent] = match
  const read = withPoint(body.trim(), decimal, mayGroup)
  return read && built(sign, read.digits, exponent, read.mark, read.isGrouped)
}
