/**
 * Joint confidence regions of Bmax and K in f(x) = T0 + c·x + Bmax·K·x/(1+K·x), with T0 and c re-optimised everywhere.
 * For a given K the model is linear in the rest, so S(Bmax) is a parabola and each K contributes an exact pair of ends;
 * nothing is taken from the covariance, which would draw an ellipse where the region is bent.
 */

export interface WeightedPoint {
  /** concentration [mol/L] */
  x: number
  /** cloud point [°C] */
  y: number
  /** relative weight [1] */
  weight: number
}

/** At one K [1/M], the two values of Bmax [K] on the edge of the region. */
export interface ContourSlice {
  K: number
  low: number
  high: number
}

const stepsPerSide = 48
const bisections = 30
/** ln K is followed this far to both sides of the estimate: a factor of 20. */
const reach = 3

interface Parabola {
  minimum: number
  centre: number
  curvature: number
}

/** The part of v that no line 1, x explains, in the metric of the weights. */
function withoutLine(points: readonly WeightedPoint[], v: readonly number[]): number[] {
  let w = 0
  let wx = 0
  let wv = 0
  points.forEach(({ x, weight }, i) => {
    w += weight
    wx += weight * x
    wv += weight * v[i]!
  })
  const meanX = wx / w
  const meanV = wv / w
  let xx = 0
  let xv = 0
  points.forEach(({ x, weight }, i) => {
    xx += weight * (x - meanX) ** 2
    xv += weight * (x - meanX) * (v[i]! - meanV)
  })
  return points.map(({ x }, i) => v[i]! - meanV - xv / xx * (x - meanX))
}

function parabolaAt(points: readonly WeightedPoint[], y: readonly number[], K: number): Parabola {
  const z = withoutLine(points, points.map(({ x }) => K * x / (1 + K * x)))
  let yy = 0
  let yz = 0
  let zz = 0
  points.forEach(({ weight }, i) => {
    yy += weight * y[i]! ** 2
    yz += weight * y[i]! * z[i]!
    zz += weight * z[i]! ** 2
  })
  return { minimum: yy - yz ** 2 / zz, centre: yz / zz, curvature: zz }
}

/** f that an F variable of 2 and ν degrees of freedom exceeds with probability 1 − level; closed for 2. */
function fQuantile2(level: number, degreesOfFreedom: number): number {
  return degreesOfFreedom / 2 * ((1 - level) ** (-2 / degreesOfFreedom) - 1)
}

/**
 * The region S ≤ S_min + 2·s²·F(level; 2, n − 4) as slices from low to high K.
 *
 * @param points readings with their weights; at least five, at four concentrations or more
 * @param estimate K of the fit [1/M]
 * @param level such as 0.95
 * @returns slices and whether the region closes within a factor of 20 of the estimate on each side
 */
export function tradeContour(points: readonly WeightedPoint[], estimate: number, level: number): { slices: ContourSlice[], isClosed: boolean } {
  const degreesOfFreedom = points.length - 4
  const y = withoutLine(points, points.map(point => point.y))
  const best = parabolaAt(points, y, estimate).minimum
  const limit = best * (1 + 2 * fQuantile2(level, degreesOfFreedom) / degreesOfFreedom)
  const isInside = (shift: number) => parabolaAt(points, y, estimate * Math.exp(shift)).minimum <= limit
  const ends = [-1, 1].map(side => side * edge(shift => isInside(side * shift)))
  const [from, to] = ends as [number, number]
  const slices = Array.from({ length: 2 * stepsPerSide + 1 }, (_, index) => {
    // Steps crowd at both ends, where the outline turns.
    const part = (1 - Math.cos(Math.PI * index / (2 * stepsPerSide))) / 2
    const K = estimate * Math.exp(from + part * (to - from))
    const { minimum, centre, curvature } = parabolaAt(points, y, K)
    const half = Math.sqrt(Math.max(0, limit - minimum) / curvature)
    return { K, low: centre - half, high: centre + half }
  })
  return { slices, isClosed: Math.max(-from, to) < reach }
}

/** How far from 0 a connected region reaches, at most `reach`: its first edge, by bisection. */
function edge(isInside: (shift: number) => boolean): number {
  const grid = Array.from({ length: stepsPerSide }, (_, index) => reach * (index + 1) / stepsPerSide)
  const first = grid.findIndex(shift => !isInside(shift))
  if (first < 0) return reach
  let [inside, outside] = [grid[first - 1] ?? 0, grid[first]!]
  for (let step = 0; step < bisections; step++) {
    const middle = (inside + outside) / 2
    if (isInside(middle)) inside = middle
    else outside = middle
  }
  return inside
}
