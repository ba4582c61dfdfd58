/** Fits of several series at once, with constants that they share. */
import type { FittedParameter, ModelName, ParameterOptions, Point, SdMeaning, StopReason, Weighting } from '../fitting/types'

export interface SharedSeries {
  id: string
  model: ModelName
  points: readonly Point[]
  parameters?: Readonly<Record<string, ParameterOptions>>
}

/** One value of a constant for several series. */
export interface Tie {
  parameter: string
  series: readonly string[]
}

/** Blanks that are measured once and speak for the shared T0 of several series. */
export interface SharedBlanks {
  points: readonly Point[]
  series: readonly string[]
}

export interface SharedRequest {
  series: readonly SharedSeries[]
  ties: readonly Tie[]
  blanks?: readonly SharedBlanks[]
  weighting?: Weighting
  sdMeaning?: SdMeaning
  confidence?: number
}

export interface SharedSeriesResult {
  id: string
  model: ModelName
  n: number
  stopReason: StopReason
  /** tied ones with the value they share */
  parameters: FittedParameter[]
  /** measured − fitted [K], in the order of the series' points */
  residuals: number[]
}

export interface SharedResult {
  series: SharedSeriesResult[]
  tied: (FittedParameter & { series: string[] })[]
  n: number
  degreesOfFreedom: number
  converged: boolean
  /** steps of the shared constants */
  steps: number
  weighting: Weighting
  sdMeaning: SdMeaning
  residualSumOfSquares: number
  residualStandardDeviation: number | null
  /** over `columns`; null where no scatter is left to estimate it */
  covariance: number[][] | null
  /** what each row of the covariance is: a tied constant (its place in `tied`), or a series' own */
  columns: ({ tie: number } | { series: string, parameter: string })[]
}
