import { decimalOf, movePoint, type Decimal } from './decimal'
import { fold, tidy } from './fold'
import { readNumber, type DecimalMark, type WrittenNumber } from './number'
import { cutUnit, type Unit } from './units'

export interface Quantity {
  kind: 'number'
  number: Decimal
  mark: '.' | ',' | null
  isGrouped: boolean
  unit: Unit | null
  /** what the cell itself states: 31.2 ± 0.1 or 31.2(1) */
  uncertainty: { number: Decimal, isConcise: boolean } | null
  limit: 'exact' | 'below' | 'above'
  isApproximate: boolean
  isFormulaLike: boolean
}

export type QuantityReading = Quantity | { kind: 'empty' | 'not-determined' | 'formula-like' | 'text' | 'date' }

const notDetermined = new Set([
  'n.d.', 'nd', 'n.d', 'n/d', 'n/a', 'n.a.', 'na', 'nan', '-', '--', '---', '–', '—', '/', '?', 'null', 'none', 'not determined', 'not measured', 'n.m.', 'nm',
  'nicht bestimmt', 'nicht gemessen', 'n.b.', 'n. b.', 'n. d.', 'k.a.', 'k. a.', 'ikke malt', 'ikke bestemt', 'i.m.', 'i.b.', 'non determine', 'non mesure',
  'no determinado', 'no medido', 'not observed', 'none observed', 'no transition', 'no clouding', 'no cloud point', 'keine trubung', 'nicht beobachtet', 'ikke observert', 'non observe', 'no observado', 'insoluble', 'unloslich', 's/d', '#n/a', '#na', '#nv', 'x',
])
const limits: readonly (readonly ['below' | 'above', RegExp])[] = [
  ['below', /^(?:<=?|≤|⩽|below|under|unter|moins de|menos de)\s*/i],
  ['above', /^(?:>=?|≥|⩾|above|over|uber|über|plus de|mas de|más de)\s*/i],
]
const approximately = /^(?:[~≈∼≃]|ca\.?|c\.|approx\.?|circa|about|etwa|env\.?|omtrent|aprox\.?)\s*/i
const plusMinus = /\s*(?:±|\+\s?\/\s?-|\+-|\\pm)\s*/
const concise = /^(.*\d)\s?\((\d+(?:[.,]\d+)?)\)(?:\s?[x×·*] ?10 ?\^? ?([+-]?\d+))?$/

type Read = (text: string) => WrittenNumber | null

function uncertaintyOf(main: WrittenNumber, digits: string, read: Read): Decimal | null {
  const written = read(digits)
  if (!written) return null
  // 31.2(1): the digits in brackets count in units of the last place.
  return written.mark === null ? movePoint(decimalOf(digits), -main.decimals) : written
}

function withStatedUncertainty(text: string, read: Read): Pick<Quantity, 'number' | 'uncertainty' | 'mark' | 'isGrouped' | 'unit'> | null {
  const [left = '', right, rest] = text.replace(/\(\s*(±|\+\s?\/\s?-|\+-)(.*)\)/, '$1$2').replace(/^\((.*(?:±|\+\s?\/\s?-).*)\)(.*)$/, '$1 $2').split(plusMinus)
  if (right !== undefined && rest === undefined) {
    const [value, spread] = [cutUnit(left), cutUnit(right.trim())]
    const [number, stated] = [read(value.text.trim()), read(spread.text.trim())]
    if (!number || !stated) return null
    return { number, mark: number.mark ?? stated.mark, isGrouped: number.isGrouped, unit: value.unit ?? spread.unit, uncertainty: { number: stated, isConcise: false } }
  }
  const { text: bare, unit } = cutUnit(text)
  const match = concise.exec(bare)
  const number = match?.[1] ? read(match[1]) : null
  const stated = number && match?.[2] ? uncertaintyOf(number, match[2], read) : null
  if (!number || !stated) return null
  const power = Number(match?.[3] ?? 0)
  return { number: movePoint(number, power), mark: number.mark, isGrouped: number.isGrouped, unit, uncertainty: { number: movePoint(stated, power), isConcise: true } }
}

const certain = { limit: 'exact', isApproximate: false, isFormulaLike: false, uncertainty: null, unit: null } as const

/** Longer texts are remarks; patterns that look back and forth are kept from them. */
const longest = 80

/** What a cell says where a number is expected. Formulas are never run. */
export function readQuantity(raw: string, decimal: DecimalMark, mayGroup: boolean): QuantityReading {
  const written = raw.trim()
  const text = written.length > longest ? written : tidy(written)
  if (text === '') return { kind: 'empty' }
  if (text.length > longest) return { kind: /^[=@]/.test(text) ? 'formula-like' : 'text' }
  const plain = readNumber(text, decimal, mayGroup)
  if (plain) return { kind: 'number', number: plain, mark: plain.mark, isGrouped: plain.isGrouped, ...certain }
  if (notDetermined.has(fold(text))) return { kind: 'not-determined' }
  return readMarked(text, written => readNumber(written, decimal, mayGroup))
}

/** Numbers with something about them: a limit, a doubt, a unit, an uncertainty. */
function readMarked(text: string, read: Read): QuantityReading {
  const isFormulaLike = /^[=@']/.test(text)
  let rest = text.replace(/^[=@']\s*/, '')
  const limit = limits.find(([, pattern]) => pattern.test(rest))
  if (limit) rest = rest.replace(limit[1], '')
  const isApproximate = approximately.test(rest) || /\d\s?[?*]$/.test(rest)
  rest = rest.replace(approximately, '').replace(/\s?[?*]+$/, '')
  const about = { limit: limit?.[0] ?? 'exact', isApproximate, isFormulaLike } as const
  const stated = withStatedUncertainty(rest, read)
  if (stated) return { kind: 'number', ...stated, ...about }
  const { text: bare, unit } = cutUnit(rest)
  const number = read(bare.trim())
  if (number) return { kind: 'number', number, mark: number.mark, isGrouped: number.isGrouped, uncertainty: null, unit, ...about }
  const isFormula = (isFormulaLike && !text.startsWith('\'')) || /^[+-]\s?(?:[A-Za-z(]|\d.*[-+*/(])/.test(text)
  return { kind: isFormula ? 'formula-like' : 'text' }
}
