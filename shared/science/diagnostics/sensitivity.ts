/** How far the constants hang on choices that somebody else might make otherwise: one fit a choice. */
import { entersFit, fitOrNone, pointsOf } from '../fitting'
import { ScienceError } from '../errors'
import { modelNames, weightings, type FitResult, type ModelName, type NamedRequest, type Weighting } from '../fitting/types'
import { models } from '../models'
import { fitRobust, robustKinds, type RobustKind } from '../robust/robust'

/** A reading with what decides whether it enters a fit. */
export interface JudgedReading {
  x: number
  y: number
  sd: number | null
  n: number | null
  limit: string
  direction: 'heating' | 'cooling'
  setAside: unknown
  blank: boolean
}

export type Variation
  = | { code: 'model', model: ModelName }
    | { code: 'weighting', weighting: Weighting }
    | { code: 'robust', kind: RobustKind }
    /** readings set aside are back */
    | { code: 'restored', count: number }
    | { code: 'without-blanks', count: number }
    | { code: 'branch', direction: 'heating' | 'cooling' }

export interface SensitivityRow {
  variation: Variation
  /** of the constants of the fit in question, in its order; null where this choice leaves one open or does not have it */
  constants: { name: string, estimate: number | null, shift: number | null }[]
}

export interface Sensitivity {
  rows: SensitivityRow[]
}

type Clouds = 'on-heating' | 'on-cooling'

/**
 * Fits the readings under every other choice and measures how far each constant moves.
 *
 * @param request how the fit in question was asked for; its points are not used
 * @param base the fit in question
 * @returns shifts in standard errors of `base`; a choice that cannot be fitted is left out
 */
export function sensitivityOf(readings: readonly JudgedReading[], request: Omit<NamedRequest, 'points'>, base: FitResult, clouds: Clouds): Sensitivity {
  return { rows: fitsOf(readings, request, base, clouds).map(([variation, result]) => ({ variation, constants: constantsOf(base, result) })) }
}

type Varied = [Variation, FitResult | null]

function fitsOf(readings: readonly JudgedReading[], request: Omit<NamedRequest, 'points'>, base: FitResult, clouds: Clouds): [Variation, FitResult][] {
  const used = readings.filter(reading => entersFit(reading, clouds))
  const points = taken(used)
  const asked = { ...request, intervals: 't' as const }
  const other = (part: Partial<NamedRequest>) => fitOrNone({ ...asked, points, ...part })
  const back = readings.filter(reading => entersFit({ ...reading, setAside: null }, clouds))
  const salted = used.filter(({ blank }) => !blank)
  const turned = clouds === 'on-heating' ? 'on-cooling' : 'on-heating'
  const branch = readings.filter(reading => entersFit(reading, turned))
  const all: Varied[] = [
    ...modelNames.filter(model => model !== request.model).map((model): Varied => [{ code: 'model', model }, other({ model, parameters: held(request, model) })]),
    ...weightings.filter(weighting => weighting !== base.weighting && isPossible(weighting, used)).map((weighting): Varied => [{ code: 'weighting', weighting }, other({ weighting, sdMeaning: 'relative' })]),
    ...robustKinds.map((kind): Varied => [{ code: 'robust', kind }, robustOrNone({ ...asked, points }, kind)]),
    ...(back.length > used.length ? [[{ code: 'restored', count: back.length - used.length }, other({ points: taken(back) })] satisfies Varied] : []),
    ...(salted.length < used.length ? [[{ code: 'without-blanks', count: used.length - salted.length }, other({ points: taken(salted) })] satisfies Varied] : []),
    ...(branch.length > 0 ? [[{ code: 'branch', direction: turned === 'on-cooling' ? 'cooling' : 'heating' }, other({ points: taken(branch) })] satisfies Varied] : []),
  ]
  return all.filter((pair): pair is [Variation, FitResult] => pair[1] !== null)
}

const taken = (readings: readonly JudgedReading[]) => pointsOf(readings.map(reading => ({ ...reading, entersFit: true })))

function isPossible(weighting: Weighting, readings: readonly JudgedReading[]): boolean {
  if (weighting === 'none') return true
  return readings.every(({ sd, n }) => weighting === 'sd' ? sd !== null : n !== null)
}

/** Held and bounded constants carry over to the models that have them. */
function held({ parameters }: Omit<NamedRequest, 'points'>, model: ModelName): NamedRequest['parameters'] {
  const known = new Set(models[model].parameters.map(({ name }) => name))
  return parameters && Object.fromEntries(Object.entries(parameters).filter(([name]) => known.has(name)))
}

function robustOrNone(request: NamedRequest, kind: RobustKind): FitResult | null {
  try {
    const { fit, converged } = fitRobust(request, kind)
    return converged ? fit : null
  }
  catch (error) {
    if (error instanceof ScienceError) return null
    throw error
  }
}

function constantsOf(base: FitResult, other: FitResult): SensitivityRow['constants'] {
  return base.parameters.filter(({ fixed }) => !fixed).map(({ name, estimate, standardError }) => {
    const found = other.parameters.find(parameter => parameter.name === name)?.estimate ?? null
    return { name, estimate: found, shift: found !== null && estimate !== null && standardError ? (found - estimate) / standardError : null }
  })
}
