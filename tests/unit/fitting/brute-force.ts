import type { Point } from '#shared/science/fitting'

/**
 * Lowest sum of squares of T0 + c·x + Bmax·K·x/(1 + K·x) by exhaustion, sharing no code with the engine: 1,200 values of
 * ln K, modified Gram–Schmidt at each, golden section about every low place, and both limits.
 */
export function bruteForce(points: readonly Point[]): { sum: number, limit: number } {
  const xs = points.map(({ x }) => x)
  const mean = points.reduce((sum, { y }) => sum + y, 0) / points.length
  const ys = points.map(({ y }) => y - mean)
  const ones = xs.map(() => 1)
  const xMax = Math.max(...xs)
  const xMin = Math.min(...xs.filter(x => x > 0))
  const at = (logK: number) => {
    const k = Math.exp(logK)
    const isWeak = k * xMax < 1
    // x²/(1 + Kx) and 1/(1 + Kx) span the same space as the binding term beside 1 and x.
    return remainder([ones, xs, xs.map(x => (isWeak ? x * x : 1) / (1 + k * x))], ys)
  }
  const limit = Math.min(remainder([ones, xs, xs.map(x => x * x)], ys), remainder([ones, xs, xs.map(x => xs.includes(0) ? Number(x > 0) : 1 / x)], ys))
  const low = Math.log(1e-3 / xMax)
  const step = (Math.log(1e3 / xMin) - low) / 1_200
  const grid = Array.from({ length: 1_201 }, (_, i) => at(low + i * step))
  let sum = limit
  for (let i = 1; i < 1_200; i++) {
    if (grid[i]! <= grid[i - 1]! && grid[i]! <= grid[i + 1]!) sum = Math.min(sum, goldenSection(at, low + (i - 1) * step, low + (i + 1) * step))
  }
  return { sum, limit }
}

/** What is left of ys after projection off the columns, twice over. */
function remainder(columns: number[][], ys: number[]): number {
  const basis: number[][] = []
  for (const column of columns) {
    const rest = [...column]
    for (let pass = 0; pass < 2; pass++) for (const known of basis) subtract(rest, known)
    const length = Math.sqrt(dot(rest, rest))
    if (length > 1e-12 * Math.sqrt(dot(column, column))) basis.push(rest.map(value => value / length))
  }
  const rest = [...ys]
  for (let pass = 0; pass < 2; pass++) for (const known of basis) subtract(rest, known)
  return dot(rest, rest)
}

function subtract(values: number[], unit: number[]): void {
  const amount = dot(values, unit)
  for (let i = 0; i < values.length; i++) values[i]! -= amount * unit[i]!
}

function dot(a: number[], b: number[]): number {
  return a.reduce((sum, value, i) => sum + value * b[i]!, 0)
}

function goldenSection(f: (at: number) => number, from: number, to: number): number {
  const share = (Math.sqrt(5) - 1) / 2
  let [low, high] = [from, to]
  for (let round = 0; round < 40; round++) {
    const left = high - share * (high - low)
    const right = low + share * (high - low)
    if (f(left) < f(right)) high = right
    else low = left
  }
  return f((low + high) / 2)
}
