/** How readings are fitted: as somebody chose, and as usual where nobody did. The same in the browser and on the server. */
import { supportOf } from './compare'
import { fit } from './fit'
import { ScienceError, type InputProblem } from '../errors'
import type { FitRequest, FitResult, ModelName, Point } from './types'

export type ChosenOptions = Partial<Pick<FitRequest, 'parameters' | 'weighting' | 'sdMeaning' | 'confidence' | 'intervals'>>

/** model null: the form that the readings support. */
export interface Choice {
  model: ModelName | null
  options: ChosenOptions
}

export interface ChosenFit {
  model: ModelName
  options: ChosenOptions
  result: FitResult
}

/** Three places on the axis cannot tell a line from a curve: nobody would quote a constant from them. */
const fewestPlaces = 4

/** Readings with their numbers of samples are weighted by them; otherwise the engine's default holds. */
export function usualOptions(points: readonly Point[]): ChosenOptions {
  return points.every(point => point.n !== undefined) ? { weighting: 'replicates' } : {}
}

/**
 * Fits readings as chosen.
 *
 * @param points x [mol/L], y [°C]
 * @returns null where the readings are too few for any form, or for the chosen one
 */
export function fitAsChosen(points: readonly Point[], choice: Choice | null): ChosenFit | null {
  if (new Set(points.map(({ x }) => x)).size < fewestPlaces) return null
  const options = optionsFor(points, choice)
  const model = choice?.model ?? supportedModel(points, options)
  const result = fitOrNone({ ...options, model, points })
  return result && { model, options, result }
}

/** What the engine finds wrong with a choice, by the options' own paths; readings too few for it are no fault of the choice. */
export function choiceFaults(points: readonly Point[], choice: Choice): InputProblem[] {
  try {
    fit({ ...optionsFor(points, choice), model: choice.model ?? 'linear', points })
    return []
  }
  catch (error) {
    if (!(error instanceof ScienceError)) throw error
    return error.problems.filter(({ path }) => !path.startsWith('points'))
  }
}

/** A fit, or nothing where the readings are too few for the model. */
export function fitOrNone(request: FitRequest): FitResult | null {
  try {
    return fit(request)
  }
  catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

/** A choice that says something about weights says all of it. */
function optionsFor(points: readonly Point[], choice: Choice | null): ChosenOptions {
  const { weighting, sdMeaning } = choice?.options ?? {}
  return weighting || sdMeaning ? choice!.options : { ...usualOptions(points), ...choice?.options }
}

/** A binding term only where the readings ask for one, else the straight line. */
function supportedModel(points: readonly Point[], options: ChosenOptions): ModelName {
  const [line, binding] = (['linear', 'linear-langmuir'] as const).map(model => fitOrNone({ ...options, model, points }))
  return line && binding && supportOf({ ...options, points }, line, binding).verdict === 'supported' ? 'linear-langmuir' : 'linear'
}
