/**
 * Numbers with their uncertainty as they are printed: 4.31(18), −12.40(29), 4.3 +0.9/−0.4.
 *
 * @source JCGM 100:2008 (GUM), 7.2.2 (the parenthesis form); two digits are this product's rule
 */

const minus = '−'
/** Between these powers of ten a number is written out. */
const smallestExponent = -5
const largestExponent = 6
const noValue = '—'
const digitsWithoutUncertainty = 5

const superscriptDigits: Readonly<Record<string, string>> = { '-': '⁻', '0': '⁰', '1': '¹', '2': '²', '3': '³', '4': '⁴', '5': '⁵', '6': '⁶', '7': '⁷', '8': '⁸', '9': '⁹' }

/** The value to the last place of its two-digit uncertainty: 4.31(18). Without an uncertainty, five digits. */
export function concise(value: number | null, uncertainty: number | null): string {
  if (value === null || !Number.isFinite(value)) return noValue
  if (uncertainty === null || !Number.isFinite(uncertainty) || uncertainty === 0) return plain(value)
  const size = Math.abs(uncertainty)
  const lastPlace = exponentAfterRounding(size, 2) - 1
  const shift = sharedExponent(Math.max(Math.abs(value), size), lastPlace)
  const decimals = Math.max(shift - lastPlace, 0)
  // An uncertainty of one unit or more keeps its decimal point: 0.2(3.1) cannot be read as 0.2(31).
  const isFraction = decimals > 0 && size / 10 ** shift < 0.995
  const digits = isFraction ? String(Math.round(size / 10 ** lastPlace)) : fixed(size / 10 ** shift, decimals)
  return withPower(`${fixed(value / 10 ** shift, decimals)}(${digits})`, shift)
}

/** Value with unequal uncertainties upwards and downwards; one digit of the larger, two where it starts with 1 or 2. */
export function asymmetric(value: number | null, up: number | null, down: number | null): string {
  if (value === null || !Number.isFinite(value)) return noValue
  const sizes = [up, down].flatMap(size => size === null || !Number.isFinite(size) ? [] : [Math.abs(size)])
  const largest = Math.max(...sizes, 0)
  if (largest === 0) return plain(value)
  const digits = Number(largest.toExponential(1).slice(0, 1)) < 3 ? 2 : 1
  const lastPlace = exponentAfterRounding(largest, digits) - digits + 1
  const shift = sharedExponent(Math.max(Math.abs(value), largest), lastPlace)
  const decimals = Math.max(shift - lastPlace, 0)
  const write = (size: number | null, sign: string) => `${sign}${size === null || !Number.isFinite(size) ? '∞' : fixed(Math.abs(size) / 10 ** shift, decimals)}`
  const body = `${fixed(value / 10 ** shift, decimals)} ${write(up, '+')}/${write(down, minus)}`
  return shift === 0 ? body : withPower(`(${body})`, shift)
}

/** A number alone, with a true minus sign. */
export function plain(value: number | null, significantDigits = digitsWithoutUncertainty): string {
  if (value === null || !Number.isFinite(value)) return noValue
  if (value === 0) return '0'
  const exponent = exponentAfterRounding(Math.abs(value), significantDigits)
  const isWrittenOut = exponent >= smallestExponent && exponent < largestExponent
  const rounded = Number(value.toPrecision(significantDigits))
  if (isWrittenOut) return rounded.toFixed(Math.max(significantDigits - 1 - exponent, 0)).replace(/(\.\d*?)0+$/, '$1').replace(/\.$/, '').replace('-', minus)
  return withPower(String(Number((rounded / 10 ** exponent).toPrecision(significantDigits))).replace('-', minus), exponent)
}

/** Exactly so many decimals, with a true minus sign and never minus zero. */
export function fixed(value: number, decimals: number): string {
  const text = value.toFixed(decimals)
  return Number(text) === 0 ? text.replace('-', '') : text.replace('-', minus)
}

/** Power of ten of the first digit once the number is rounded: 0.0996 to two digits is 0.10. */
function exponentAfterRounding(size: number, digits: number): number {
  return Number(size.toExponential(digits - 1).split('e')[1])
}

/** Power of ten taken out of the number: 0 while everything can be written out. */
function sharedExponent(largest: number, lastPlace: number): number {
  const exponent = Math.floor(Math.log10(largest))
  const isWrittenOut = lastPlace <= 0 && exponent >= smallestExponent && exponent < largestExponent
  return isWrittenOut ? 0 : exponent
}

function withPower(body: string, exponent: number): string {
  if (exponent === 0) return body
  return `${body} × 10${[...String(exponent)].map(sign => superscriptDigits[sign]).join('')}`
}
