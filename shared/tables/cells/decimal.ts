/** A number as it was written: the exact double of its digits, and how many of them stand behind the point. */
export interface Decimal {
  value: number
  /** digits as JavaScript reads them, such as -305.01 or 1e-3 */
  text: string
  decimals: number
}

/** More digits than this are the dust of a calculation. */
const mostDigits = 15

/** A number of digits as JavaScript reads them. */
export function decimalOf(text: string): Decimal {
  const [mantissa = '', exponent = '0'] = text.toLowerCase().split('e')
  const point = mantissa.indexOf('.')
  const written = point < 0 ? 0 : mantissa.length - point - 1
  return { value: Number(text), text, decimals: Math.max(0, written - Number(exponent)) }
}

/** A double of a spreadsheet: its value is kept as it is, its digits without the dust of a calculation. */
export function decimalOfDouble(value: number): Decimal {
  const { decimals } = decimalOf(String(Number(value.toPrecision(mostDigits))))
  return { value, text: String(value), decimals }
}

/** The digits without the dust that a spreadsheet's calculation leaves at the end. */
function cleanText({ value, text }: Decimal): string {
  return text.replace(/[-.e+]/g, '').length > mostDigits ? String(Number(value.toPrecision(mostDigits))) : text
}

/** value · 10^power by moving the point, so that 50 mmol/L is the double of 0.05. */
export function movePoint(number: Decimal, power: number): Decimal {
  if (power === 0) return number
  const [mantissa = '', exponent = '0'] = cleanText(number).toLowerCase().split('e')
  return { ...decimalOf(`${mantissa}e${Number(exponent) + power}`), decimals: Math.max(0, number.decimals - power) }
}

/** Kelvin as °C, subtracted on whole numbers of the last digit. */
export function celsiusOfKelvin(number: Decimal): Decimal {
  const places = Math.min(12, Math.max(2, number.decimals))
  const scaled = Math.round(Number(`${number.value.toFixed(places)}e${places}`)) - Number(`273.15e${places}`)
  return { value: Number(`${scaled}e-${places}`), text: String(Number(`${scaled}e-${places}`)), decimals: places }
}

function roundTo(value: number, decimals: number): Decimal {
  const text = value.toFixed(Math.min(decimals, 20))
  return { value: Number(text) || 0, text, decimals }
}

/** °F as °C; one digit more than the source has keeps all it said. */
export function celsiusOfFahrenheit(number: Decimal): Decimal {
  return roundTo((number.value - 32) * 5 / 9, number.decimals + 1)
}

/** A difference in °F as one in K, with one digit more than the source has. */
export function kelvinOfFahrenheitStep(number: Decimal): Decimal {
  return roundTo(number.value * 5 / 9, number.decimals + 1)
}

/** A number as a person would type it: no exponent where digits do. */
export function typed(number: Decimal): string {
  if (number.text.toLowerCase().includes('e') && Math.abs(number.value) >= 1e-6) return number.value.toFixed(Math.min(20, number.decimals))
  return number.text
}

export interface Spread { mean: Decimal, sd: number | null, n: number }

/** Mean of repeats to two digits more than they have, and their standard deviation (n − 1), from whole numbers of the last digit. */
export function spreadOf(numbers: readonly Decimal[]): Spread {
  const n = numbers.length
  const places = Math.min(9, Math.max(...numbers.map(number => number.decimals)))
  const whole = numbers.map(number => Math.round(Number(`${number.value.toFixed(places)}e${places}`)))
  const mean = whole.reduce((sum, value) => sum + value, 0) / n
  const squares = whole.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  return { mean: roundTo(Number(`${mean}e-${places}`), places + 2), sd: n < 2 ? null : Number(`${Math.sqrt(squares / (n - 1))}e-${places}`), n }
}
