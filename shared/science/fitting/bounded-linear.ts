import { backSubstitute, isDeficient, triangularize } from '../numeric/qr'

export interface LinearSolution {
  coefficients: Float64Array
  sum: number
}

/**
 * Least squares for at most a handful of coefficients between bounds, exactly: the problem is convex, so the best of all
 * feasible choices of which coefficients sit at which bound is the answer.
 *
 * @param columns n × m, column-major; `target` n; both whitened
 */
export function solveBounded(columns: Float64Array, target: Float64Array, lower: readonly number[], upper: readonly number[]): LinearSolution {
  const m = lower.length
  const seats: (number | null)[] = new Array<number | null>(m).fill(null)
  const unrestricted = solveSeated(columns, target, seats)
  if (isFeasible(unrestricted.coefficients, lower, upper)) return unrestricted
  let best: LinearSolution | null = null
  const visit = (j: number) => {
    if (j === m) {
      const found = solveSeated(columns, target, seats)
      if (isFeasible(found.coefficients, lower, upper) && (!best || found.sum < best.sum)) best = found
      return
    }
    for (const seat of [null, lower[j]!, upper[j]!]) {
      if (seat !== null && !Number.isFinite(seat)) continue
      seats[j] = seat
      visit(j + 1)
    }
    seats[j] = null
  }
  visit(0)
  return best ?? unrestricted
}

function isFeasible(values: Float64Array, lower: readonly number[], upper: readonly number[]): boolean {
  return values.every((value, j) => value >= lower[j]! && value <= upper[j]!)
}

/** Least squares with some coefficients held; dependent columns get the coefficient 0. */
function solveSeated(columns: Float64Array, target: Float64Array, seats: readonly (number | null)[]): LinearSolution {
  const n = target.length
  const rest = target.slice()
  const free: number[] = []
  seats.forEach((seat, j) => {
    if (seat === null) free.push(j)
    else for (let i = 0; i < n; i++) rest[i]! -= seat * columns[j * n + i]!
  })
  const work = new Float64Array(n * free.length)
  free.forEach((j, k) => work.set(columns.subarray(j * n, (j + 1) * n), k * n))
  triangularize(work, n, free.length, rest)
  const solution = new Float64Array(free.length)
  if (!isDeficient(work, n, free.length, 1e-14)) backSubstitute(work, n, free.length, rest, solution)
  let sum = 0
  for (let i = free.length; i < n; i++) sum += rest[i]! * rest[i]!
  const coefficients = Float64Array.from(seats, seat => seat ?? 0)
  free.forEach((j, k) => (coefficients[j] = solution[k]!))
  return { coefficients, sum }
}
