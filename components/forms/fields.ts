/** The fields of a form as data: what each is called, how it is typed, and whether a report wants it. */
import { readCell } from '~~/composables/sheet/cell'

export interface FormField {
  name: string
  label: string
  kind: 'text' | 'long' | 'number' | 'day' | 'choice'
  /** for a choice: value and words */
  options?: readonly (readonly [value: string, words: string])[]
  hint?: string
  /** nothing can be kept without it */
  isNeeded?: boolean
  /** a good report of cloud points states it (common practice); until then it may wait */
  isForReport?: boolean
}

export type FormTexts = Record<string, string>
type FormValues = Record<string, unknown>

/** What stands under a field that says nothing else. */
export function hintOf({ hint, isNeeded, isForReport }: FormField): string {
  const wait = isNeeded ? '' : isForReport ? 'a report states it; may wait' : 'may wait'
  return [hint, wait].filter(Boolean).join('; ')
}

/** The fields as texts: what stands in a thing that is changed, or nothing. */
export function textsOf(fields: readonly FormField[], thing: object = {}): FormTexts {
  const values = thing as FormValues
  return Object.fromEntries(fields.map(({ name }) => [name, values[name] === null || values[name] === undefined ? '' : String(values[name])]))
}

/** The texts as the contract takes them. What should be a number and is none stays a text, so that its check says so. */
export function valuesOf(fields: readonly FormField[], texts: FormTexts): FormValues {
  return Object.fromEntries(fields.map(({ name, kind, isNeeded }) => [name, valueOf(kind, texts[name] ?? '', isNeeded ?? false)]))
}

function valueOf(kind: FormField['kind'], typed: string, isNeeded: boolean): unknown {
  const text = typed.trim()
  if (text === '') return isNeeded && kind === 'text' ? '' : null
  if (kind !== 'number') return text
  const cell = readCell(text)
  return cell.kind === 'number' ? cell.value : text
}
