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
  const { data, residuals, jacobian, point, partials, bounds } = roomFor(readings, size)

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
        initialValues, damping, maxIterations: iterations, errorTolerance: 0, ...bounds,
        jacobianFunction: (scaled) => {
          moveTo(scaled)
          objective.jacobian(point, jacobian)
          return partialsAt
        },
      })
      if (!(outcome.parameterError < before)) return null
      const moved = new Float64Array(size)
      for (let j = 0; j < size; j++) moved[j] = outcome.parameterValues[j]! / scales[j]!
      return moved
    }
    catch {
      // A Jacobian that is not finite throws out of the linear algebra: the same as a step that does not help.
      return null
    }
  }
  return { step }
}

interface Room {
  data: { x: Float64Array, y: Float64Array }
  residuals: Float64Array
  jacobian: Float64Array
  point: Float64Array
  partials: number[]
  bounds: { minValues: number[], maxValues: number[] }
}

const rooms = new Map<number, Room>()
const mostRooms = 50
const sizeLimit = 1_000

/** Arrays for one step, kept by size: nothing in them outlives a step, and bootstraps take thousands of the same. */
function roomFor(readings: number, size: number): Room {
  const key = readings * sizeLimit + size
  const known = rooms.get(key)
  if (known) return known
  const room: Room = {
    // The readings are addressed by number; the target of every residual is zero.
    data: { x: Float64Array.from({ length: readings }, (_, i) => i), y: new Float64Array(readings) },
    residuals: new Float64Array(readings),
    jacobian: new Float64Array(readings * size),
    point: new Float64Array(size),
    partials: new Array<number>(size).fill(0),
    bounds: { minValues: new Array<number>(size).fill(-Infinity), maxValues: new Array<number>(size).fill(Infinity) },
  }
  if (rooms.size >= mostRooms) rooms.clear()
  rooms.set(key, room)
  return room
}

/** Lengths of the columns of a Jacobian; 1 for a column of zeros. */
export function columnLengths(jacobian: Float64Array, readings: number, size: number, out: Float64Array): void {
  for (let j = 0; j < size; j++) {
    let square = 0
    for (let i = 0; i < readings; i++) square += jacobian[j * readings + i]! ** 2
    out[j] = square > 0 && square < Infinity ? Math.sqrt(square) : 1
  }
}
