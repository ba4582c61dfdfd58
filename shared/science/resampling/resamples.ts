/** Readings drawn anew in three ways, and the fit to each. Everything is drawn from one seed. */
import { analyseNamed } from '../fitting/named'
import { toOriginal, type ScaledData } from '../fitting/scale'
import { indexOf, solve, type End, type Problem } from '../fitting/solve'
import type { NamedRequest } from '../fitting/types'
import { ScienceError } from '../errors'
import { seededRandom, type Random } from '../random'

export const bootstrapKinds = ['residual', 'case', 'parametric'] as const
export type BootstrapKind = typeof bootstrapKinds[number]

/** Sets the seed of the second stream apart from that of the first. */
const otherStream = 0x5BD1E995

/** Estimates of every parameter on the original axes; NaN where the resample leaves one open. */
export interface Refit {
  values: Float64Array
  end: End | null
}

/** One series, ready to be drawn anew. @throws ScienceError 'no-finite-optimum', 'unusable-input' */
export class Resampler {
  readonly names: string[]
  /** the fit to the readings themselves */
  readonly original: Refit
  private readonly problem: Problem
  private readonly random: Random
  /** A stream of its own: whether a band is asked for changes no draw. */
  private readonly randomForReadings: Random
  private readonly fitted: Float64Array
  /** Whitened, corrected for leverage, centred: what residual resampling draws from. */
  private readonly residuals: Float64Array
  private readonly deviation: number
  private readonly groups: number[][]

  constructor(private readonly request: NamedRequest, readonly kind: BootstrapKind, seed: number) {
    const { solution, covariance, variance, weights } = analyseNamed(request)
    if (solution.end) throw new ScienceError('no-finite-optimum', [{ path: 'points', message: 'the best K lies at 0 or without bound: there is no estimate to resample about' }])
    if (variance === null) throw new ScienceError('no-freedom', [{ path: 'points', message: 'as many constants as readings leave no scatter to resample' }])
    this.problem = solution.problem
    const { data } = this.problem
    this.random = seededRandom(seed)
    this.randomForReadings = seededRandom(seed ^ otherStream)
    this.names = this.problem.model.parameters.map(({ name }) => name)
    this.original = { values: originals(this.problem, solution.values), end: null }
    this.fitted = Float64Array.from(data.x, x => this.problem.model.value(solution.values, x))
    const raw = Float64Array.from(data.y, (y, i) => (y - this.fitted[i]!) * data.root[i]! / Math.sqrt(Math.max(1 - (covariance?.leverages?.[i] ?? 0), 1e-9)))
    const mean = raw.reduce((sum, value) => sum + value, 0) / data.n
    this.residuals = raw.map(value => value - mean)
    this.deviation = weights.sdMeaning === 'absolute' ? 1 / Math.sqrt(data.sumScale) : Math.sqrt(variance)
    this.groups = groupsOf(request.points.map(({ x }) => x))
  }

  /** Draws once and fits. */
  next(): Refit {
    if (this.kind === 'case') return this.fitRows(this.drawRows())
    const { data } = this.problem
    const y = Float64Array.from(this.fitted, (fitted, i) => fitted + this.noise(this.random) / data.root[i]!)
    return this.fitTo({ ...data, y })
  }

  /** Fits that leave out one unit each: a reading, or with cases all readings of one concentration. */
  leaveOneOut(): (Refit | null)[] {
    const units = this.kind === 'case' ? this.groups : this.request.points.map((_, i) => [i])
    return units.map((unit) => {
      const rows = this.request.points.flatMap((_, i) => unit.includes(i) ? [] : [i])
      return this.isEnough(rows) ? this.fitRows(rows) : null
    })
  }

  /** How far one new reading would lie off the curve [K], for a reading of the heaviest weight there is. */
  newReading(): number {
    return this.noise(this.randomForReadings) * this.problem.data.yScale
  }

  /** A whitened deviation of one reading. */
  private noise(random: Random): number {
    return this.kind === 'parametric' ? this.deviation * random.normal() : this.residuals[Math.floor(random.uniform() * this.residuals.length)]!
  }

  private drawRows(): number[] {
    for (;;) {
      const rows = this.groups.flatMap(() => this.groups[Math.floor(this.random.uniform() * this.groups.length)]!)
      if (this.isEnough(rows)) return rows
    }
  }

  private isEnough(rows: readonly number[]): boolean {
    const free = this.problem.held.reduce((count, value) => count + Number(Number.isNaN(value)), 0)
    return new Set(rows.map(i => this.request.points[i]!.x)).size >= free
  }

  private fitRows(rows: readonly number[]): Refit {
    const { data } = this.problem
    const take = (values: Float64Array) => Float64Array.from(rows, i => values[i]!)
    return this.fitTo({ ...data, n: rows.length, x: take(data.x), y: take(data.y), root: take(data.root) })
  }

  private fitTo(data: ScaledData): Refit {
    const problem = { ...this.problem, data }
    const { values, estimated, end } = solve(problem)
    if (!end) return { values: originals(problem, values), end }
    const open = Float64Array.from(problem.model.parameters, ({ name }) => {
      const at = name === 'T0' ? indexOf(estimated, name) : -1
      return at >= 0 ? toOriginal(estimated, data, at, values[at]!) : name === 'K' ? (end === 'zero' ? 0 : Infinity) : NaN
    })
    return { values: open, end }
  }
}

function originals({ model, data }: Problem, values: Float64Array): Float64Array {
  return Float64Array.from(model.parameters, (_, j) => toOriginal(model, data, j, values[j]!))
}

/** Places of the readings that share a concentration. */
function groupsOf(xs: readonly number[]): number[][] {
  const groups = new Map<number, number[]>()
  xs.forEach((x, i) => groups.set(x, [...groups.get(x) ?? [], i]))
  return [...groups.values()]
}
