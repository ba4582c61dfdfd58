/**
 * Shared constants by variable projection: for given shared constants every series is solved exactly by itself; a step of
 * the shared ones is Gauss–Newton on what the series' own constants leave of the residuals, halved until the sum falls.
 *
 * @source Golub, SIAM Journal on Numerical Analysis 10 (1973) 413; Kaufman, BIT 15 (1975) 49
 */
import type { Solution } from '../fitting/solve'
import { backSubstitute, isDeficient, triangularize } from '../numeric/qr'
import { eliminate, solveBlock, type Assembly, type Elimination } from './blocks'

export interface SharedPoint {
  /** tied constants, scaled */
  shared: Float64Array
  solutions: Solution[]
  sum: number
}

export interface SharedOptimum extends SharedPoint {
  eliminations: Elimination[]
  /** R of the tied constants, column-major with `rows` rows; null where they are not determined */
  triangle: { values: Float64Array, rows: number } | null
  converged: boolean
  steps: number
}

const mostSteps = 60
const mostHalvings = 30
const settledStep = 1e-12
const dependentColumns = 1e-12

export function descendShared(assembly: Assembly, start: Float64Array): SharedOptimum {
  let here = pointAt(assembly, start)
  for (let steps = 0; ; steps++) {
    const eliminations = assembly.blocks.map((block, b) => eliminate(block, here.solutions[b]!))
    const { matrix, rows, turned } = stack(assembly, eliminations, here.shared)
    triangularize(matrix, rows, assembly.ties, turned)
    const isOpen = isDeficient(matrix, rows, assembly.ties, dependentColumns)
    const end = (converged: boolean): SharedOptimum => ({ ...here, eliminations, triangle: isOpen ? null : { values: matrix, rows }, converged, steps })
    if (assembly.ties === 0) return end(true)
    if (isOpen) return end(false)
    const step = new Float64Array(assembly.ties)
    backSubstitute(matrix, rows, assembly.ties, turned, step)
    const size = step.reduce((most, value, t) => Math.max(most, Math.abs(value) / Math.max(Math.abs(here.shared[t]!), 1e-3)), 0)
    if (size < settledStep) return end(true)
    if (steps === mostSteps) return end(false)
    const next = lower(assembly, here, step)
    // No step lowers the sum any more: rounding decides from here on.
    if (!next) return end(size < Math.sqrt(settledStep))
    here = next
  }
}

export function pointAt(assembly: Assembly, shared: Float64Array): SharedPoint {
  const solutions = assembly.blocks.map(block => solveBlock(block, shared))
  let sum = solutions.reduce((total, solution) => total + solution.sum, 0)
  for (const { data, tie } of assembly.blanks) {
    for (let i = 0; i < data.n; i++) sum += ((shared[tie]! - data.y[i]!) * data.root[i]!) ** 2
  }
  return { shared, solutions, sum }
}

function lower(assembly: Assembly, here: SharedPoint, step: Float64Array): SharedPoint | null {
  for (let halving = 0, share = 1; halving < mostHalvings; halving++, share /= 2) {
    const next = pointAt(assembly, here.shared.map((value, t) => value - share * step[t]!))
    if (next.sum < here.sum) return next
  }
  return null
}

/** One row a direction in which a block still depends on the tied constants, and one a blank. */
function stack({ ties, blanks }: Assembly, eliminations: readonly Elimination[], shared: Float64Array) {
  const rows = Math.max(ties, eliminations.reduce((sum, one) => sum + one.ties.length, 0) + blanks.reduce((sum, { data }) => sum + data.n, 0))
  const matrix = new Float64Array(rows * ties)
  const turned = new Float64Array(rows)
  let row = 0
  for (const { ties: known, own, triangle, rows: stored, turned: rest } of eliminations) {
    for (let k = 0; k < known.length; k++, row++) {
      for (let q = k; q < known.length; q++) matrix[known[q]! * rows + row]! += triangle[(own + q) * stored + own + k]!
      turned[row] = rest[own + k]!
    }
  }
  for (const { data, tie } of blanks) {
    for (let i = 0; i < data.n; i++, row++) {
      matrix[tie * rows + row] = data.root[i]!
      turned[row] = (shared[tie]! - data.y[i]!) * data.root[i]!
    }
  }
  return { matrix, rows, turned }
}
