/** What the fit engine takes and gives; definitions stand in docs/numerics.md. */

export const modelNames = ['linear', 'langmuir', 'linear-langmuir', 'linear-quadratic', 'linear-hill'] as const
export type ModelName = typeof modelNames[number]

/** One reading: x concentration [mol/L], y cloud point [°C], sd standard uncertainty of y [K], n independent samples. */
export interface Point {
  x: number
  y: number
  sd?: number
  n?: number
}

export interface ParameterOptions {
  fixed?: number
  min?: number
  max?: number
  start?: number
}

/** A model typed by a person: an expression in one variable and its parameters, each with a start. */
export interface ExpressionModel {
  expression: string
  variable: string
  parameters: Record<string, ParameterOptions & { start: number }>
}

export const weightings = ['none', 'replicates', 'sd'] as const
export type Weighting = typeof weightings[number]
export type SdMeaning = 'relative' | 'absolute'
export type IntervalMethod = 'profile' | 't'

export interface FitRequest {
  model: ModelName | ExpressionModel
  points: readonly Point[]
  parameters?: Readonly<Record<string, ParameterOptions>>
  weighting?: Weighting
  sdMeaning?: SdMeaning
  confidence?: number
  intervals?: IntervalMethod
}

/** A fit of one named model. */
export type NamedRequest = Omit<FitRequest, 'model'> & { model: ModelName }

export const stopReasons = ['relative-offset', 'step', 'limit', 'bound', 'no-finite-optimum'] as const
export type StopReason = typeof stopReasons[number]

/** A null end: the profile never crosses on that side. */
export interface Interval {
  level: number
  lower: number | null
  upper: number | null
  method: IntervalMethod
}

export interface FittedParameter {
  name: string
  unit: string
  estimate: number | null
  standardError: number | null
  interval: Interval | null
  fixed: boolean
}

export interface DerivedQuantity {
  name: string
  unit: string
  estimate: number
  standardError: number | null
}

export interface Residual {
  x: number
  y: number
  fitted: number
  residual: number
  standardized: number | null
  leverage: number | null
}

export const noteCodes = [
  'binding-not-identified', 'weakly-determined', 'holds-as-product', 'sign-of-binding-unknown', 'saturation-not-reached',
  'low-concentrations-missing', 'blank-missing', 'few-points', 'one-point-decides', 'pattern-in-residuals', 'not-normal',
  'lack-of-fit', 'weights-dominate', 'weights-from-few-replicates', 'resolution-floor', 'parameter-at-bound', 'not-converged',
  'singular', 'no-evidence-of-binding', 'extrapolated', 'screening-region', 'ph-not-held', 'concentrations-taken-as-exact',
] as const
export type NoteCode = typeof noteCodes[number]
export type Severity = 'info' | 'caution' | 'problem'

/** What the data do or do not support: a code and its values; the sentence is the client's. */
export interface FitNote {
  code: NoteCode
  severity: Severity
  values: Record<string, number | string | boolean | null>
}

export interface FitResult {
  model: ModelName | 'expression'
  n: number
  degreesOfFreedom: number
  converged: boolean
  stopReason: StopReason
  weighting: Weighting
  sdMeaning: SdMeaning
  parameters: FittedParameter[]
  /** Free parameters only, in the order of `parameters`; null where standard errors are. */
  covariance: number[][] | null
  correlation: number[][] | null
  residualSumOfSquares: number
  residualStandardDeviation: number | null
  aicc: number | null
  bic: number | null
  residuals: Residual[]
  derived: DerivedQuantity[]
  notes: FitNote[]
  engine: { name: 'anionary', version: string }
}
