import { tidy } from './fold'

/** A unit as a table writes it: what it measures, its name here, and how its numbers become ours. */
export interface Unit {
  of: 'concentration' | 'temperature' | 'rate'
  /** as the column says it; K stands for temperatures and for differences alike */
  name: 'mol/L' | 'mmol/L' | 'mol/kg' | 'mmol/kg' | '°C' | 'K' | '°F' | 'K/min'
}

const concentrations: readonly (readonly [Unit['name'], RegExp])[] = [
  ['mol/L', /^(?:M|mol\/[lL]|mol[lL]-1|mol\/dm3|moldm-3|kmol\/m3|[Mm]olar|[Mm]olaire|mol\/[Ll]it(?:er|re))$/],
  ['mmol/L', /^(?:mM|mmol\/[lL]|mmol[lL]-1|mmol\/dm3|mmoldm-3|mol\/m3|molm-3|[Mm]illimolar)$/],
  ['mol/kg', /^(?:m|mol\/kg|molkg-1|[Mm]olal|mol\/kg\(?(?:H2O|water|solvent)\)?)$/],
  ['mmol/kg', /^(?:mmol\/kg|mmolkg-1|mm|[Mm]illimolal)$/],
]
const temperatures: readonly (readonly [Unit['name'], RegExp])[] = [
  ['°C', /^(?:[°ºo˚]C|℃|C|[Dd]eg\.?C|[Cc]elsius|[Gg]radC(?:elsius)?|[Dd]egreesC(?:elsius)?)$/],
  ['K', /^(?:K|[Kk]elvin|[°º]K)$/],
  ['°F', /^(?:[°ºo˚]F|℉|F|[Dd]eg\.?F|[Ff]ahrenheit|[Dd]egreesF(?:ahrenheit)?)$/],
]
const rate = /^(?:K|[°ºo˚]?C|degC)(?:\/min|min-1)$/

const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹'
const digits: Readonly<Record<string, string>> = { '⁻': '-', '₂': '2', ...Object.fromEntries([...superscripts].map((sign, digit) => [sign, String(digit)])) }

/** Recognises a unit such as mM, mol·L⁻¹, mol dm-3, °C, deg C or K/min; null for anything else. */
export function unitOf(text: string): Unit | null {
  const written = tidy(text).replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹⁻₂]/g, sign => digits[sign] ?? sign).replace(/[\s·⋅*^{}$]|(?<=l)\.(?=[Lkd])/g, '')
  if (written === '' || written.length > 20) return null
  const concentration = concentrations.find(([, pattern]) => pattern.test(written))
  if (concentration) return { of: 'concentration', name: concentration[0] }
  const temperature = temperatures.find(([, pattern]) => pattern.test(written))
  if (temperature) return { of: 'temperature', name: temperature[0] }
  return rate.test(written) ? { of: 'rate', name: 'K/min' } : null
}

const withUnit = /^(.*?[\d.)])\s*((?:[°ºo˚℃℉µ]|[A-Za-z]).*)$/

/** Cuts the unit off a cell: 50 mM → 50 and mmol/L. Without one the text stays as it is. */
export function cutUnit(text: string): { text: string, unit: Unit | null } {
  const match = withUnit.exec(text)
  const unit = match?.[2] ? unitOf(match[2]) : null
  return unit && match?.[1] ? { text: match[1], unit } : { text, unit: null }
}
