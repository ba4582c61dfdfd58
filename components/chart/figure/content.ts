import { bandAt, curveAt, type DrawableFit } from '#shared/science/fitting/curve'
import type { DerivedQuantity } from '#shared/science/fitting/types'
import { concise } from '#shared/science/notation'
import { concentrationAxis } from './axis'
import type { CurveSamples, FigureContent, FigureReading, TurningPoint } from './types'

/** What a figure needs of a fit: its curve, its band and, where there is one, its turning point. */
export type FigureFit = DrawableFit & { derived?: readonly DerivedQuantity[] }

export interface FigureSource {
  readings: readonly FigureReading[]
  fit: FigureFit | null
  straightLine?: FigureFit | null
  ion?: string | null
  clouds?: FigureContent['clouds']
  gaps?: FigureContent['gaps']
}

const sampleCount = 161

/** An invented curve of the usual kind, drawn while there is nothing to fit. */
const sketchParameters = { T0: 31, c: -3.9, Bmax: 3.7, K: 5 } as const

function sampled(fit: FigureFit | null | undefined, xs: number[]): CurveSamples | null {
  const y = fit ? curveAt(fit, xs) : null
  if (!fit || !y) return null
  const band = bandAt(fit, xs, 0.95)
  return { x: xs, y, lower: band?.lower ?? null, upper: band?.upper ?? null }
}

function sketch(xs: number[]): CurveSamples {
  const { T0, c, Bmax, K } = sketchParameters
  return { x: xs, y: xs.map(x => T0 + c * x + Bmax * K * x / (1 + K * x)), lower: null, upper: null }
}

/** The turning point in words, with the height as a shift from the cloud point without salt. */
export function turningPointOf(derived: readonly DerivedQuantity[]): TurningPoint | null {
  const place = derived.find(quantity => quantity.name === 'maximumConcentration')
  const height = derived.find(quantity => quantity.name === 'maximumShift')
  if (!place || !height) return null
  const sign = height.estimate > 0 ? '+' : ''
  const name = height.estimate > 0 ? 'highest point' : 'lowest point'
  return {
    x: place.estimate,
    text: `${name} ${sign}${concise(height.estimate, height.standardError)} K at ${concise(place.estimate, place.standardError)} M`,
  }
}

/** Gathers what a figure shows from readings and fits. */
export function figureContent({ readings, fit, straightLine, ion = null, clouds = 'on-heating', gaps = [] }: FigureSource): FigureContent {
  const { max } = concentrationAxis([...readings, ...gaps].map(({ x }) => x), 6)
  const xs = Array.from({ length: sampleCount }, (_, index) => max * index / (sampleCount - 1))
  const isSketch = readings.length === 0
  return {
    readings, ion, clouds, gaps, isSketch,
    curve: isSketch ? sketch(xs) : sampled(fit, xs),
    straightLine: sampled(straightLine, xs),
    turningPoint: fit?.derived ? turningPointOf(fit.derived) : null,
  }
}
