import { levenbergMarquardt } from 'ml-levenberg-marquardt'
import { sumOfSquares, type Objective } from './objective'

/**
 * Trial steps by ml-levenberg-marquardt, which is given whitened residuals on columns of unit length and a target of
 * zero. Its weights, stopping and step acceptance are not used: they do not do what a certified fit needs (docs/numerics.md).
 */
export interface Marquardt {
  /** Tries `iterations` undisturbed steps; null when none lowers the sum of squares. */
  step(point: Float64Array, columnScales: Float64Array, damping: number, iterations: number): Float64Array | null
}

export function marquardt(objective: Objective): Marquardt {
  const { readings, size } = objective
  const indices = new Float64Array(readings)
  for (let i = 0; i < readings; i++) indices[i] = i
  const data = { x: indices, y: new Float64Array(readings) }
  const residuals = new Float64Array(readings)
  const jacobian = new Float64Array(readings * size)
  const point = new Float64Array(size)
  const partials = new Array<number>(size).fill(0)
  const unbounded = { minValues: new Array<number>(size).fill(-Infinity), maxValues: new Array<number>(size).fill(Infinity) }

  function step(start: Float64Array, scales: Float64Array, damping: number, iterations: number): Float64Array | null {
    let isCurrent = false
    const moveTo = (scaled: ArrayLike<number>) => {
      let isSame = isCurrent
      for (let j = 0; j < size; j++) {
        const value = scaled[j]! / scales[j]!
        if (value !== point[j]) isSame = false
        point[j] = value
      }
      isCurrent = true
      if (!isSame) objective.residuals(point, residuals)
    }
    const residualAt = (index: number) => residuals[index]!
    const partialsAt = (index: number) => {
      for (let j = 0; j < size; j++) partials[j] = jacobian[j * readings + index]! / scales[j]!
      return partials
    }
    const initialValues = new Array<number>(size)
    for (let j = 0; j < size; j++) initialValues[j] = start[j]! * scales[j]!
    objective.residuals(start, residuals)
    const before = sumOfSquares(residuals)
    try {
      const outcome = levenbergMarquardt(data, (scaled) => {
        moveTo(scaled)
        return residualAt
      }, {
        initialValues, damping, maxIterations: iterations, errorTolerance: 0, ...unbounded,
        jacobianFunction: (scaled) => {
          moveTo(scaled)
          objective.jacobian(point, jacobian)
          return partialsAt
        },
      })
      if (!(outcome.parameterError < before)) return null
      return Float64Array.from(outcome.parameterValues, (value, j) => value / scales[j]!)
    }
    catch {
      // A Jacobian that is not finite throws out of the linear algebra: the same as a step that does not help.
      return null
    }
  }
  return { step }
}

/** Lengths of the columns of a Jacobian; 1 for a column of zeros. */
export function columnLengths(jacobian: Float64Array, readings: number, size: number, out: Float64Array): void {
  for (let j = 0; j < size; j++) {
    let square = 0
    for (let i = 0; i < readings; i++) square += jacobian[j * readings + i]! ** 2
    out[j] = square > 0 && square < Infinity ? Math.sqrt(square) : 1
  }
}
