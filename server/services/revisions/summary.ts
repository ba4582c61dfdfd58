import type { FitChoice } from '#shared/contracts/series'
import { fixed } from '#shared/science/notation'
import type { Told } from './changes'

const modelWords: Record<NonNullable<FitChoice['model']>, string> = {
  'linear': 'a straight line', 'langmuir': 'saturable binding alone', 'linear-langmuir': 'saturable binding',
  'linear-quadratic': 'line and curvature', 'linear-hill': 'cooperative binding',
}
const reasonWords = { 'typing-error': 'a typing error', 're-measured': 're-measured', 'other': null } as const
const weightWords = { none: 'equal weights', replicates: 'weights from replicates', sd: 'weights from standard uncertainties' } as const

const several = (count: number, one: string, many: string) => count === 1 ? one : `${count} ${many}`
const printed = (value: number) => fixed(value, Math.max(2, String(value).split('.')[1]?.length ?? 0))

/** A reading by its concentration: its place in the table shifts with the blanks before it. */
const named = ({ number, before }: Told) => before && before.concentration > 0 ? `reading at ${printed(before.concentration)} M` : `reading ${number}`

/** What was done, in a line for the history: '2 readings set aside, with reasons'. */
export function summaryOf(told: readonly Told[], choice: FitChoice | undefined, before: FitChoice | null): string {
  const parts = [...correctionWords(told), ...asideWords(told), ...addedWords(told), ...(choice ? choiceWords(choice, before) : [])]
  return parts.join('; ') || 'kept as it was'
}

function correctionWords(told: readonly Told[]): string[] {
  const corrections = told.flatMap(({ change, number, before }) => change.kind === 'correct' && before ? [{ change, number, before }] : [])
  const [first] = corrections
  if (!first || corrections.length > 1) return first ? [`${corrections.length} readings corrected`] : []
  const { change, before } = first
  const from = change.to.y !== undefined && change.to.y !== before.value ? ` from ${printed(before.value)}` : ''
  const why = reasonWords[change.reason] ?? change.words
  return [`${named(first)} corrected${from}${why ? `, ${why}` : ''}`]
}

function asideWords(told: readonly Told[]): string[] {
  const aside = told.filter(({ change }) => change.kind === 'set-aside')
  const back = told.filter(({ change }) => change.kind === 'put-back')
  return [
    ...(aside.length > 0 ? [several(aside.length, `${named(aside[0]!)} set aside, with its reason`, 'readings set aside, with reasons')] : []),
    ...(back.length > 0 ? [several(back.length, `${named(back[0]!)} put back`, 'readings put back')] : []),
  ]
}

function addedWords(told: readonly Told[]): string[] {
  const count = told.filter(({ change }) => change.kind === 'add').length
  return count > 0 ? [several(count, 'a reading added', 'readings added')] : []
}

function choiceWords({ model, options }: FitChoice, before: FitChoice | null): string[] {
  const parts: string[] = []
  if (model !== (before?.model ?? null)) parts.push(model ? `model changed to ${modelWords[model]}` : 'model by what the readings support')
  if (options.weighting !== before?.options.weighting) parts.push(options.weighting ? weightWords[options.weighting] : 'usual weights')
  if (JSON.stringify(options.parameters ?? {}) !== JSON.stringify(before?.options.parameters ?? {})) parts.push('constants held or bounded anew')
  return parts.length > 0 ? parts : ['options of the fit changed']
}
