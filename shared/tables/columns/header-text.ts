import { fold, tidy } from '../cells/fold'
import { unitOf, type Unit } from '../cells/units'

/** A heading without its unit, as it is compared, and the unit it states. */
export interface HeaderText { name: string, unit: Unit | null }

const longestHeading = 200

/** Units of amounts that cannot be turned into ours without knowing more than the table says. */
const foreign = /%|\bppm\b|\bwt\b|[µμ]M\b|\b[µμunm]?[gM]\s?\/\s?(?:[mk]?[lLg]|d?m3|100)|\bg\s?[lL]-1|\bw\/[vw]\b|\b[un]M\b/

/** Whether a heading states an amount in such a unit, as in g/L or wt%. */
export function hasForeignUnit(header: string): boolean {
  return foreign.test(header.slice(0, longestHeading).replace('⁻¹', '-1'))
}

const bracketed = /^(.*?)\s*[([{]\s*(?:in\s+)?([^()[\]{}]+(?:\([^)]*\))?)\s*[)\]}]\s*(.*)$/
const separated: readonly RegExp[] = [/^(.*?)\s*\/\s*(.+)$/, /^(.*),\s*(.+)$/, /^(.*\S)\s+(?:in|en|i)\s+(.+)$/, /^(.*\S)[\s_]+(\S+\s\S+)$/, /^(.*\S)[\s_]+(\S+)$/]

function plainName(text: string): string {
  return fold(text).replace(/[_:.]+/g, ' ').replace(/\s+/g, ' ').trim()
}

/** Cuts a heading: "c(NaCl) / mol L-1", "Trübungspunkt (°C)", "conc, mM" and a bare "mM". */
export function headerText(header: string): HeaderText {
  const text = tidy(header.slice(0, longestHeading).replace(/\s+/g, ' ')).replace(/^#+\s*/, '').replace(/\*+$/, '')
  // A lone letter is a symbol more often than a unit: c, m, K. M and mM stand for the concentration itself.
  const whole = text.length === 1 && text !== 'M' ? null : unitOf(text)
  if (whole) return { name: '', unit: whole }
  const inBrackets = bracketed.exec(text)
  const bracketUnit = inBrackets ? unitOf(inBrackets[2] ?? '') : null
  // [M] after nothing is a concentration, too.
  if (inBrackets && bracketUnit) return { name: plainName(`${inBrackets[1]} ${inBrackets[3]}`), unit: bracketUnit }
  for (const pattern of separated) {
    const match = pattern.exec(text)
    const unit = match?.[2] ? unitOf(match[2].replace(/^[([]|[)\]]$/g, '')) : null
    if (match && unit) return { name: plainName(match[1] ?? ''), unit }
  }
  return { name: plainName(text), unit: null }
}
