import type { Objective } from '../fitting/objective'
import type { Compiled } from './compile'
import { blockSize } from './tape'

/** Elementary operations that may still be spent; residuals are not a number once it is used up. */
export interface Budget {
  left: number
}

export interface ExpressionData {
  /** One column for each variable of the expression. */
  predictors: readonly Float64Array[]
  y: Float64Array
  /** √w of each reading. */
  root: Float64Array
}

/** @param held value of each parameter that is not free, NaN for a free one */
export function expressionObjective(compiled: Compiled, { predictors, y, root }: ExpressionData, held: Float64Array, budget: Budget): Objective {
  const { tape, value, slopes } = compiled
  const n = y.length
  const free = Array.from(held.keys()).filter(j => Number.isNaN(held[j]))
  const room = tape.workspace()
  const firstParameter = predictors.length
  const all = held.slice()
  // The linear algebra that follows each evaluation is counted with it.
  const valueCost = n * (value + 10)
  const slopeCost = n * (tape.length + 2 * free.length ** 2 + 10)

  function run(point: ArrayLike<number>, start: number, upTo: number): number {
    const count = Math.min(blockSize, n - start)
    predictors.forEach((column, at) => room.set(column.subarray(start, start + count), at * blockSize))
    free.forEach((j, at) => (all[j] = point[at]!))
    for (let j = 0; j < all.length; j++) room.fill(all[j]!, (firstParameter + j) * blockSize, (firstParameter + j) * blockSize + count)
    tape.run(room, count, upTo)
    return count
  }
  return {
    readings: n,
    size: free.length,
    residuals(point, out) {
      if ((budget.left -= valueCost) < 0) {
        out.fill(NaN)
        return
      }
      for (let start = 0; start < n; start += blockSize) {
        const count = run(point, start, value)
        for (let i = 0; i < count; i++) out[start + i] = (room[value * blockSize + i]! - y[start + i]!) * root[start + i]!
      }
    },
    jacobian(point, out) {
      budget.left -= slopeCost
      for (let start = 0; start < n; start += blockSize) {
        const count = run(point, start, tape.length - 1)
        free.forEach((j, at) => {
          const from = slopes[j]! * blockSize
          for (let i = 0; i < count; i++) out[at * n + start + i] = room[from + i]! * root[start + i]!
        })
      }
    },
  }
}
