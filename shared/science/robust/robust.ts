/**
 * Fits that single readings cannot pull: iteratively reweighted least squares with Huber's or Tukey's weights.
 *
 * The scale is the median absolute residual over 0.6745, found anew in each round. The answer is the weighted fit of the
 * last round: its standard errors take the weights as given and are approximate.
 *
 * @source Huber, Annals of Mathematical Statistics 35 (1964) 73; Beaton, Technometrics 16 (1974) 147 (the biweight)
 */
import { analyseNamed, fitWithoutNotes } from '../fitting/named'
import type { FitResult, NamedRequest, Point } from '../fitting/types'
import { fitReweighted, type Reweighted } from './reweighted'

export const robustKinds = ['huber', 'tukey'] as const
export type RobustKind = typeof robustKinds[number]

export interface RobustFit extends Reweighted {
  kind: RobustKind
  /** weight of each reading beside its own of least squares, 0 to 1 */
  weights: number[]
  /** robust scale of a residual: in K, or with weights by uncertainty a multiple of it */
  scale: number
}

/** 95 % efficiency at normal errors. */
const corner = { huber: 1.345, tukey: 4.685 } as const
const normalMedian = 0.6744897501960817
/** A weight of 0 would be no weight at all: the reading stays, and counts for nothing that shows. */
const leastWeight = 1e-8

const weightOf: Record<RobustKind, (u: number) => number> = {
  huber: u => u <= corner.huber ? 1 : corner.huber / u,
  tukey: u => u < corner.tukey ? (1 - (u / corner.tukey) ** 2) ** 2 : 0,
}

/**
 * @returns the fit, with each reading's weight and the scale
 * @throws ScienceError as `fit` does
 */
export function fitRobust(request: NamedRequest, kind: RobustKind): RobustFit {
  const { weights: own } = analyseNamed(request)
  const roots = request.points.map((_, i) => own.values ? Math.sqrt(own.values[i]!) : 1)
  const start = kind === 'tukey' ? fitRobust(request, 'huber').fit : fitWithoutNotes(request)
  const judged = (fit: FitResult) => judge(fit, request.points, roots, kind)
  const { points: _, ...found } = fitReweighted(request, start, fit => judged(fit).points)
  const { scale, weights } = judged(found.fit)
  return { ...found, kind, weights, scale }
}

function judge({ residuals }: FitResult, points: readonly Point[], roots: readonly number[], kind: RobustKind) {
  const whitened = residuals.map(({ residual }, i) => Math.abs(residual) * roots[i]!)
  const scale = medianOf(whitened) / normalMedian
  const weights = whitened.map(size => scale > 0 ? weightOf[kind](size / scale) : Number(size === 0))
  return {
    scale, weights,
    points: points.map(({ x, y, n }, i): Point => ({ x, y, ...(n !== undefined && { n }), sd: 1 / (roots[i]! * Math.sqrt(Math.max(weights[i]!, leastWeight))) })),
  }
}

function medianOf(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  const middle = sorted.length >> 1
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2
}
