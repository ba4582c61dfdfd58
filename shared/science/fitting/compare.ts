/** Do the readings speak for a binding term? */
import { BindingProfile } from './profile'
import { nestedTest } from './criteria'
import { fitWithoutNotes } from './named'
import { scaleData } from './scale'
import { modelNames, type FitRequest, type FitResult, type ModelName } from './types'
import { weightsOf } from './weights'
import { ScienceError } from '../errors'

export type Verdict = 'supported' | 'undecided' | 'no-evidence'

export interface ModelSupport {
  model: ModelName
  residualStandardDeviation: number | null
  aicc: number | null
  /** AICc above the best model's. */
  deltaAicc: number | null
}

export interface Support {
  verdict: Verdict | null
  /** AICc(linear) − AICc(linear-langmuir); positive speaks for binding. */
  deltaAicc: number | null
  /** Probability of so large an improvement on a true straight line (nominal). */
  probability: number | null
  /** Smallest |Bmax| [K] that these readings would have shown, at K = 5/x_max. */
  detectable: { bmax: number, k: number } | null
}

export interface ModelComparison extends Support {
  models: ModelSupport[]
}

const supportedFrom = 4
const significance = 0.05
/** K·x_max at which the detectable Bmax is stated: a ladder that reaches well into saturation. */
const usualReach = 5

/** Every named model the readings are enough for, and the verdict on binding. */
export function compareModels(request: Omit<FitRequest, 'model' | 'parameters'>): ModelComparison {
  const fits = modelNames.flatMap(model => attempt({ ...request, model, parameters: undefined, intervals: 't' }))
  const best = Math.min(...fits.flatMap(({ aicc }) => aicc === null ? [] : [aicc]))
  const line = fits.find(({ model }) => model === 'linear')
  const binding = fits.find(({ model }) => model === 'linear-langmuir')
  return {
    ...(line && binding ? supportOf(request, line, binding) : { verdict: null, deltaAicc: null, probability: null, detectable: null }),
    models: fits.map(({ model, residualStandardDeviation, aicc }) => ({
      model: model as ModelName, residualStandardDeviation, aicc, deltaAicc: aicc === null ? null : aicc - best,
    })),
  }
}

/** A fit, or nothing where the readings are too few for the model. */
function attempt(request: FitRequest): FitResult[] {
  try {
    return [fitWithoutNotes(request)]
  }
  catch (error) {
    const isTooFew = error instanceof ScienceError && error.problems.every(({ path }) => path === 'points')
    if (isTooFew && request.points.length > 0) return []
    throw error
  }
}

export function supportOf(request: Pick<FitRequest, 'points' | 'weighting' | 'sdMeaning'>, line: FitResult, binding: FitResult): Support {
  const deltaAicc = line.aicc === null || binding.aicc === null ? null : line.aicc - binding.aicc
  const probability = nestedTest(line.residualSumOfSquares, binding.residualSumOfSquares, line.degreesOfFreedom - binding.degreesOfFreedom,
    binding.degreesOfFreedom, binding.sdMeaning === 'absolute')
  return { verdict: verdictOf(deltaAicc, probability), deltaAicc, probability, detectable: detectableBinding(request, line) }
}

function verdictOf(deltaAicc: number | null, probability: number | null): Verdict | null {
  if (deltaAicc === null || probability === null) return null
  // With few readings the correction of AICc alone outweighs any bend; a test that sees one keeps the question open.
  if (deltaAicc <= 0) return probability < significance ? 'undecided' : 'no-evidence'
  return deltaAicc >= supportedFrom && probability < significance ? 'supported' : 'undecided'
}

/** The Bmax whose expected improvement of AICc just reaches the threshold. */
function detectableBinding(request: Pick<FitRequest, 'points' | 'weighting' | 'sdMeaning'>, line: FitResult): Support['detectable'] {
  const n = line.n
  if (n < 7) return null
  const weights = weightsOf({ ...request, model: 'linear' })
  const data = scaleData(request.points.map(({ x }) => x), request.points.map(({ y }) => y), weights.values)
  // Bmax = 1 on scaled axes in place of the readings: what the straight line leaves of it is its visible part.
  const curve = { ...data, y: data.x.map(x => usualReach * x / (1 + usualReach * x)) }
  const visible = new BindingProfile(curve, { level: null, slope: null }).sumWithout * data.sumScale
  if (!(visible > 0)) return null
  const penalty = penaltyOf(n, 4, weights.sdMeaning) - penaltyOf(n, 2, weights.sdMeaning)
  const variance = weights.sdMeaning === 'absolute' ? 1 : line.residualSumOfSquares / (n - 2)
  const needed = weights.sdMeaning === 'absolute'
    ? supportedFrom + penalty
    : variance * (n - 4) * Math.expm1((supportedFrom + penalty) / n)
  return { bmax: Math.sqrt(needed / visible) * data.yScale, k: usualReach / data.xScale }
}

function penaltyOf(n: number, parameters: number, sdMeaning: 'relative' | 'absolute'): number {
  const k = sdMeaning === 'absolute' ? parameters : parameters + 1
  return 2 * k + 2 * k * (k + 1) / (n - k - 1)
}
