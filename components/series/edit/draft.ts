/** What somebody does to a series before it is kept: plain data, the draft that the server keeps is this. */
import { z } from 'zod'
import { changeReasons } from '#shared/contracts/series'
import { modelNames, weightings, type ModelName } from '#shared/science/fitting/types'

export const cellFields = ['x', 'y', 'sd', 'n', 'note'] as const
export type CellField = typeof cellFields[number]

const text = z.string().max(2_000)
const held = z.object({ fixed: text, min: text, max: text }).partial()

const choiceSchema = z.object({
  model: z.enum(modelNames).nullable(),
  weighting: z.enum(['usual', ...weightings]),
  sdMeaning: z.enum(['relative', 'absolute']),
  intervals: z.enum(['profile', 't']),
  confidence: z.number(),
  held: z.record(z.string(), held),
})

/** Keys are readings' ids, and for added readings the keys they were given here. All cells are texts, as typed. */
const draftSchema = z.object({
  cells: z.record(z.string(), z.partialRecord(z.enum(cellFields), text)),
  reasons: z.record(z.string(), z.object({ reason: z.enum(changeReasons).nullable(), words: text })),
  asides: z.record(z.string(), text),
  backs: z.array(z.string()),
  added: z.array(z.object({ key: z.string(), batch: z.string().nullable() })),
  choice: choiceSchema.nullable(),
})

export type Draft = z.infer<typeof draftSchema>
export type ChoiceText = z.infer<typeof choiceSchema>
export type HeldField = 'fixed' | 'min' | 'max'

export const noDraft: Draft = { cells: {}, reasons: {}, asides: {}, backs: [], added: [], choice: null }

/** A draft as it was kept; null where its form is not known any more. */
export function restoredDraft(content: unknown): Draft | null {
  return draftSchema.safeParse(content).data ?? null
}

/** Whether nothing at all is typed or done. */
export function isBlankDraft(draft: Draft): boolean {
  return JSON.stringify(draft) === JSON.stringify(noDraft)
}

function without<Value>(record: Readonly<Record<string, Value>>, key: string): Record<string, Value> {
  return Object.fromEntries(Object.entries(record).filter(([other]) => other !== key))
}

export function typeCell(draft: Draft, key: string, field: CellField, typed: string): Draft {
  return { ...draft, cells: { ...draft.cells, [key]: { ...draft.cells[key], [field]: typed } } }
}

/** Puts back what stands in the series; a row without other changes needs no reason any more. */
export function restoreCell(draft: Draft, key: string, field: CellField): Draft {
  const { [field]: _, ...rest } = draft.cells[key] ?? {}
  if (Object.keys(rest).length > 0) return { ...draft, cells: { ...draft.cells, [key]: rest } }
  return { ...draft, cells: without(draft.cells, key), reasons: without(draft.reasons, key) }
}

export function giveReason(draft: Draft, key: string, given: Partial<Draft['reasons'][string]>): Draft {
  const before = draft.reasons[key] ?? { reason: null, words: '' }
  return { ...draft, reasons: { ...draft.reasons, [key]: { ...before, ...given } } }
}

/** null: it is not to be set aside after all */
export function setAside(draft: Draft, key: string, reason: string | null): Draft {
  return { ...draft, asides: reason === null ? without(draft.asides, key) : { ...draft.asides, [key]: reason } }
}

export function putBack(draft: Draft, key: string, isBack: boolean): Draft {
  const others = draft.backs.filter(other => other !== key)
  return { ...draft, backs: isBack ? [...others, key] : others }
}

/** Rows that were added here and are not kept yet carry keys of their own. */
const addedPrefix = 'new-'
export const isAdded = (key: string) => key.startsWith(addedPrefix)

export function addReading(draft: Draft, batch: string | null): Draft {
  const key = `${addedPrefix}${1 + Math.max(0, ...draft.added.map(one => Number(one.key.slice(addedPrefix.length))))}`
  return { ...draft, added: [...draft.added, { key, batch }] }
}

export function placeInBatch(draft: Draft, key: string, batch: string | null): Draft {
  return { ...draft, added: draft.added.map(one => one.key === key ? { ...one, batch } : one) }
}

export function dropAdded(draft: Draft, key: string): Draft {
  return { ...draft, added: draft.added.filter(one => one.key !== key), cells: without(draft.cells, key) }
}

export function chooseFit(draft: Draft, choice: ChoiceText): Draft {
  return { ...draft, choice }
}

export function holdConstant(choice: ChoiceText, name: string, field: HeldField, typed: string): ChoiceText {
  return { ...choice, held: { ...choice.held, [name]: { ...choice.held[name], [field]: typed } } }
}

/** Another form has other constants: what is held of the old ones does not carry over. */
export function chooseModel(choice: ChoiceText, model: ModelName | null): ChoiceText {
  return { ...choice, model, held: {} }
}
