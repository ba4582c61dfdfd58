/** What a typed stock comes to: its salt, what to weigh, and what a hydrate taken as anhydrous would do. */
import { hydrateFormula, readSalt } from '#shared/science/chemistry/read-salt'
import { massToWeigh, hydrateMistake } from '#shared/science/chemistry/stocks'
import { molarMass } from '#shared/science/chemistry/molar-mass'
import { ScienceError } from '#shared/science/errors'
import { fixed, plain } from '#shared/science/notation'
import { readCell } from '~~/composables/sheet/cell'
import type { FormTexts } from './fields'

export type Making
  = | { kind: 'nothing' }
    | { kind: 'unknown', sentence: string }
    | { kind: 'salt', formula: string, name: string, hydrate: number, molarMass: string, mistake: string | null }

const problemWords = {
  unknown: 'is not a salt this service knows', misspelt: 'is spelt like no known salt', unbalanced: 'has charges that do not cancel',
} as const

const numberIn = (text: string | undefined) => {
  const cell = readCell(text ?? '')
  return cell.kind === 'number' ? cell.value : null
}

/** Waters a formula unit: as the salt's own text says, else as the field says. */
function watersOf(written: number, texts: FormTexts): number {
  return written > 0 ? written : Math.max(0, numberIn(texts.hydrate) ?? 0)
}

/** What the salt reads as, with the molar mass as bottled [g/mol]. */
export function makingOf(texts: FormTexts): Making {
  const typed = (texts.salt ?? '').trim()
  if (!typed) return { kind: 'nothing' }
  const read = readSalt(typed)
  if (read.kind === 'blank') return { kind: 'unknown', sentence: 'A blank holds no salt and needs no stock.' }
  if (read.kind === 'unknown') {
    return { kind: 'unknown', sentence: `“${typed}” ${problemWords[read.problem]}${read.suggestion ? `; ${read.suggestion} was meant?` : '. Type its formula, such as Na2SO4.'}` }
  }
  const hydrate = watersOf(read.hydrate, texts)
  const bottled = molarMass(read.salt.formula) + hydrate * molarMass('H2O')
  const mistake = hydrate > 0 ? `Weighed as if it were anhydrous, the solution is ${fixed(Math.abs(hydrateMistake({ formula: read.salt.formula, hydrate })), 1)} % weaker than its label.` : null
  return { kind: 'salt', formula: hydrateFormula(read.salt.formula, hydrate), name: read.salt.name, hydrate, molarMass: fixed(bottled, 2), mistake }
}

/** What to weigh for a wanted solution, in a sentence; null while something is missing. */
export function weighingOf(texts: FormTexts, wanted: { concentration: string, volume: string }): string | null {
  const read = readSalt((texts.salt ?? '').trim())
  const [concentration, millilitres] = [numberIn(wanted.concentration), numberIn(wanted.volume)]
  if (read.kind !== 'salt' || concentration === null || millilitres === null) return null
  const purity = numberIn(texts.purity)
  try {
    const mass = massToWeigh({ formula: read.salt.formula, hydrate: watersOf(read.hydrate, texts), ...(purity !== null && { purity }) }, concentration, millilitres / 1000)
    return `${plain(mass, 5)} g, made up to ${plain(millilitres)} mL`
  }
  catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}
