import type { Model } from '../models'

/**
 * Readings on axes of order one, with the roots of their weights: x/xScale, (y − yOffset)/yScale, √w/weightScale.
 * Every stage of a fit works on these; `toOriginal` and `toScaled` are the only ways in and out.
 */
export interface ScaledData {
  n: number
  x: Float64Array
  y: Float64Array
  root: Float64Array
  xScale: number
  yScale: number
  yOffset: number
  /** Sums of squares on the original axes are `sumScale` times those on the scaled ones. */
  sumScale: number
}

/** @param weights w of each reading, positive */
export function scaleData(x: ArrayLike<number>, y: ArrayLike<number>, weights: ArrayLike<number> | null): ScaledData {
  const n = x.length
  let xScale = 0
  let lowest = Infinity
  let highest = -Infinity
  let heaviest = 0
  for (let i = 0; i < n; i++) {
    xScale = Math.max(xScale, Math.abs(x[i]!))
    lowest = Math.min(lowest, y[i]!)
    highest = Math.max(highest, y[i]!)
    if (weights) heaviest = Math.max(heaviest, weights[i]!)
  }
  if (xScale === 0) xScale = 1
  const yOffset = lowest + (highest - lowest) / 2
  const yScale = highest > lowest ? highest - lowest : Math.max(Math.abs(highest), 1)
  const weightScale = weights ? Math.sqrt(heaviest) : 1
  const data: ScaledData = {
    n, xScale, yScale, yOffset,
    x: new Float64Array(n), y: new Float64Array(n), root: new Float64Array(n),
    sumScale: (yScale * weightScale) ** 2,
  }
  for (let i = 0; i < n; i++) {
    data.x[i] = x[i]! / xScale
    data.y[i] = (y[i]! - yOffset) / yScale
    data.root[i] = weights ? Math.sqrt(weights[i]!) / weightScale : 1
  }
  return data
}

/** Size of one scaled unit of each parameter on the original axes. */
export function parameterUnits(model: Model, data: ScaledData): Float64Array {
  const units = new Float64Array(model.parameters.length)
  model.parameters.forEach(({ yPower, xPower }, j) => (units[j] = data.yScale ** yPower * data.xScale ** xPower))
  return units
}

export function toScaled(model: Model, data: ScaledData, index: number, value: number): number {
  const { yPower, xPower, isLevel } = model.parameters[index]!
  return (value - (isLevel ? data.yOffset : 0)) / (data.yScale ** yPower * data.xScale ** xPower)
}

export function toOriginal(model: Model, data: ScaledData, index: number, value: number): number {
  const { yPower, xPower, isLevel } = model.parameters[index]!
  return value * (data.yScale ** yPower * data.xScale ** xPower) + (isLevel ? data.yOffset : 0)
}
