/** How well a model stands: information criteria and nested tests. */
import { upperTailOfChiSquare, upperTailOfF } from '../numeric/distributions'

export interface Criteria {
  aicc: number | null
  bic: number | null
}

/**
 * @param sum S = Σ w r², on the original axes
 * @param parameters free parameters p; an unknown variance counts as one more
 * @returns null where the correction of AICc has no positive denominator, or S is 0
 * @source Hurvich & Tsai, Biometrika 76 (1989) 297; Schwarz, Annals of Statistics 6 (1978) 461
 */
export function criteria(sum: number, readings: number, parameters: number, isAbsolute: boolean): Criteria {
  const k = isAbsolute ? parameters : parameters + 1
  const misfit = isAbsolute ? sum : readings * Math.log(sum / readings)
  const denominator = readings - k - 1
  return {
    aicc: denominator > 0 ? finiteOrNull(misfit + 2 * k + 2 * k * (k + 1) / denominator) : null,
    bic: finiteOrNull(misfit + k * Math.log(readings)),
  }
}

function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null
}

/**
 * Probability of a drop this large in S from the smaller to the larger of two nested models if the smaller were true:
 * an F test, or Δχ² where the sds are absolute. Nominal for a binding term: K is not identified when Bmax = 0.
 */
export function nestedTest(smaller: number, larger: number, added: number, degreesOfFreedom: number, isAbsolute: boolean): number | null {
  const drop = Math.max(smaller - larger, 0)
  if (isAbsolute) return upperTailOfChiSquare(drop, added)
  if (degreesOfFreedom <= 0) return null
  if (larger === 0) return drop === 0 ? 1 : 0
  return upperTailOfF(drop / added / (larger / degreesOfFreedom), added, degreesOfFreedom)
}
