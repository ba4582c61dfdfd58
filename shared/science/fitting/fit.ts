import { diagnose } from './diagnose'
import { analyseNamed } from './named'
import { toResult, type Analysis } from './result'
import type { FitRequest, FitResult } from './types'

/**
 * Fits a named model to readings.
 *
 * @param request concentrations x [mol/L], cloud points y [°C], standard uncertainties sd [K]
 * @throws ScienceError 'unusable-input' with every problem of the request
 */
export function fit(request: FitRequest): FitResult {
  return withNotes(analyseNamed(request))
}

/** The answer with what it does and does not support. */
export function withNotes(analysis: Analysis): FitResult {
  const result = toResult(analysis)
  return { ...result, notes: diagnose({ analysis, result }) }
}
