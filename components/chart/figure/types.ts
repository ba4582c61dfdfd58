/** One reading as a figure draws it. */
export interface FigureReading {
  /** place in the table, from 1 */
  number: number
  /** concentration [mol/L] */
  x: number
  /** cloud point [°C] */
  y: number
  /** standard uncertainty of y [K] */
  sd?: number | null
  /** independent samples */
  n?: number | null
  setAside?: boolean
  /** measured on the other branch: drawn grey, and no residual of this curve */
  apart?: boolean
  blank?: boolean
  limit?: 'exact' | 'below' | 'above' | 'salt-precipitated'
  /** letter that ties the reading to a margin note */
  key?: string
}

/** A curve on a fine grid of concentrations, with its 95 % band where the fit has one. */
export interface CurveSamples {
  x: number[]
  y: number[]
  lower: number[] | null
  upper: number[] | null
}

/** The place where a curve turns: concentration [mol/L] and words for it. */
export interface TurningPoint {
  x: number
  text: string
}

/** All a figure shows; the pictures are built from this alone. */
export interface FigureContent {
  readings: readonly FigureReading[]
  /** null: no curve is supported by the readings */
  curve: CurveSamples | null
  /** dashed beside the curve */
  straightLine: CurveSamples | null
  turningPoint: TurningPoint | null
  ion: string | null
  clouds: 'on-heating' | 'on-cooling'
  /** rows that hold a concentration but no usable cloud point */
  gaps: readonly { x: number, text: string }[]
  /** a sketch of the kind of curve to come, while there is nothing to draw */
  isSketch: boolean
}

export interface Box {
  left: number
  top: number
  right: number
  bottom: number
}

/** Colours resolved from the style sheet, so that a downloaded figure keeps them. */
export interface Palette {
  paper: string
  ink: string
  ink2: string
  rule: string
  hair: string
  error: string
  haze: string
  hazeOpacity: number
  bandOpacity: number
  front: string
}
