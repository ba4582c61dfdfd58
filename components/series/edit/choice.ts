/** How a series is to be fitted, as texts in fields and as the engine takes it. */
import type { FitChoice } from '#shared/contracts/series'
import { choiceFaults } from '#shared/science/fitting'
import type { Point } from '#shared/science/fitting/types'
import { readCell } from '~~/composables/sheet/cell'
import type { ChoiceText, HeldField } from './draft'

const usualLevel = 0.95
const heldFields = ['fixed', 'min', 'max'] as const

const written = (value: number | undefined) => value === undefined ? '' : String(value)

/** The fields as they stand for a choice; null is the usual way. */
export function choiceText(choice: FitChoice | null): ChoiceText {
  const { weighting, sdMeaning, intervals, confidence, parameters } = choice?.options ?? {}
  return {
    model: choice?.model ?? null,
    weighting: weighting ?? 'usual',
    sdMeaning: sdMeaning ?? 'relative',
    intervals: intervals ?? 'profile',
    confidence: confidence ?? usualLevel,
    held: Object.fromEntries(Object.entries(parameters ?? {}).map(([name, { fixed, min, max }]) => [name, { fixed: written(fixed), min: written(min), max: written(max) }])),
  }
}

export interface ReadChoice {
  choice: FitChoice
  /** by `held.K.fixed` */
  faults: Map<string, string>
}

/** Reads the fields; what is no number is left out of the choice and named. */
export function readChoice({ model, weighting, sdMeaning, intervals, confidence, held }: ChoiceText): ReadChoice {
  const faults = new Map<string, string>()
  const parameters: NonNullable<FitChoice['options']['parameters']> = {}
  for (const [name, texts] of Object.entries(held)) {
    const options = heldFields.map(field => [field, readHeld(texts[field] ?? '', `held.${name}.${field}`, faults)] as const)
    const given = options.filter((pair): pair is [HeldField, number] => pair[1] !== null)
    if (given.length > 0) parameters[name] = Object.fromEntries(given)
  }
  const options: FitChoice['options'] = {
    ...(weighting !== 'usual' && { weighting }),
    ...(weighting === 'sd' && { sdMeaning }),
    ...(intervals !== 'profile' && { intervals }),
    ...(confidence !== usualLevel && { confidence }),
    ...(model !== null && Object.keys(parameters).length > 0 && { parameters }),
  }
  return { choice: { model, options }, faults }
}

function readHeld(typed: string, path: string, faults: Map<string, string>): number | null {
  const cell = readCell(typed)
  if (cell.kind === 'bad') faults.set(path, 'must be a number')
  return cell.kind === 'number' ? cell.value : null
}

/** What the engine will not take, by the fields it concerns. */
export function engineFaults(points: readonly Point[], choice: FitChoice): Map<string, string> {
  const faults = choiceFaults(points, choice)
  return new Map(faults.map(({ path, message }) => [path.replace(/^parameters\./, 'held.'), message]))
}
