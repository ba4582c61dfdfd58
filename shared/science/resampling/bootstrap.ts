/** Bootstrap of a series: how its constants, its curve and a new reading scatter when the readings are drawn anew. */
import { ScienceError } from '../errors'
import type { NamedRequest } from '../fitting/types'
import { models, type Model } from '../models'
import { bcaEnds, percentileEnds, type Ends } from './intervals'
import { bootstrapKinds, Resampler, type BootstrapKind, type Refit } from './resamples'

export interface BootstrapOptions {
  kind: BootstrapKind
  samples: number
  /** 32-bit; the same seed gives the same resamples */
  seed: number
  confidence?: number
  /** concentrations [mol/L] at which bands are wanted */
  at?: readonly number[]
}

export interface BootstrapQuantity {
  name: string
  unit: string
  estimate: number
  /** scatter of the resamples that have a finite value */
  standardError: number | null
  percentile: Ends
  /** null where the correction is impossible: resamples on one side of the estimate, or a jackknife fit without optimum */
  bca: Ends | null
}

export interface BootstrapBands {
  x: number[]
  /** where the curve lies [°C] */
  curve: { lower: (number | null)[], upper: (number | null)[] }
  /** where one new reading would lie [°C] */
  reading: { lower: (number | null)[], upper: (number | null)[] }
}

export interface BootstrapResult {
  kind: BootstrapKind
  samples: number
  seed: number
  confidence: number
  /** resamples whose best K lay at 0 or without bound */
  withoutOptimum: number
  quantities: BootstrapQuantity[]
  bands: BootstrapBands | null
}

const mostSamples = 20_000
const fewestSamples = 100
const usualLevel = 0.95

/** Draws in portions, so that long runs can tell how far they are and can be stopped. */
export class Bootstrap {
  private readonly resampler: Resampler
  private readonly model: Model
  private readonly drawn: Refit[] = []
  private readonly readings: number[][] = []

  /** @throws ScienceError 'unusable-input', 'no-finite-optimum', 'no-freedom' */
  constructor(request: NamedRequest, private readonly options: BootstrapOptions) {
    check(options)
    this.model = models[request.model]
    this.resampler = new Resampler(request, options.kind, options.seed)
  }

  get done(): number {
    return this.drawn.length
  }

  /** Draws at most so many more. @returns true once all are drawn */
  advance(most: number): boolean {
    const until = Math.min(this.drawn.length + most, this.options.samples)
    while (this.drawn.length < until) {
      const refit = this.resampler.next()
      this.drawn.push(refit)
      if (this.options.at && !refit.end) this.readings.push(this.options.at.map(() => this.resampler.newReading()))
    }
    return this.drawn.length === this.options.samples
  }

  result(): BootstrapResult {
    const { kind, samples, seed, confidence = usualLevel } = this.options
    return {
      kind, samples, seed, confidence, withoutOptimum: this.drawn.filter(({ end }) => end !== null).length,
      quantities: this.quantities(confidence), bands: this.options.at ? this.bands(this.options.at, confidence) : null,
    }
  }

  private quantities(level: number): BootstrapQuantity[] {
    const leftOut = this.resampler.leaveOneOut()
    const of = this.model.parameters.map(({ name, unit }, j) => ({ name, unit, take: (values: Float64Array) => values[j]! }))
    const derived = this.model.derived(this.resampler.original.values)
      .filter(({ name, value }) => ['initialSlope', 'BmaxK', 'Kd'].includes(name) && Number.isFinite(value))
      .map(({ name, unit }) => ({ name, unit, take: (values: Float64Array) => this.model.derived(values).find(one => one.name === name)?.value ?? NaN }))
    return [...of, ...derived].map(({ name, unit, take }) => {
      const estimate = take(this.resampler.original.values)
      const sorted = Float64Array.from(this.drawn, ({ values }) => take(values)).filter(value => !Number.isNaN(value)).sort()
      const jackknife = leftOut.flatMap(refit => refit ? [take(refit.values)] : [])
      return { name, unit, estimate, standardError: scatterOf(sorted), percentile: percentileEnds(sorted, level), bca: bcaEnds(sorted, estimate, jackknife, level) }
    })
  }

  private bands(xs: readonly number[], level: number): BootstrapBands {
    const finite = this.drawn.filter(({ end }) => end === null)
    const curves = xs.map(x => Float64Array.from(finite, ({ values }) => this.model.value(values, x)))
    const ends = (columns: Float64Array[]) => {
      const all = columns.map(column => percentileEnds(column.sort(), level))
      return { lower: all.map(({ lower }) => lower), upper: all.map(({ upper }) => upper) }
    }
    const readings = curves.map((curve, at) => curve.map((value, i) => value + this.readings[i]![at]!))
    return { x: [...xs], curve: ends(curves), reading: ends(readings) }
  }
}

/** All at once, for short runs. */
export function bootstrap(request: NamedRequest, options: BootstrapOptions): BootstrapResult {
  const run = new Bootstrap(request, options)
  run.advance(options.samples)
  return run.result()
}

function scatterOf(sorted: Float64Array): number | null {
  const finite = sorted.filter(Number.isFinite)
  if (finite.length < 2) return null
  const mean = finite.reduce((sum, value) => sum + value, 0) / finite.length
  return Math.sqrt(finite.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (finite.length - 1))
}

function check({ kind, samples, seed, confidence }: BootstrapOptions): void {
  const problems = [
    !bootstrapKinds.includes(kind) && { path: 'kind', message: `must be one of ${bootstrapKinds.join(', ')}` },
    !(Number.isInteger(samples) && samples >= fewestSamples && samples <= mostSamples) && { path: 'samples', message: `must be a whole number from ${fewestSamples} to ${mostSamples}` },
    !(Number.isInteger(seed) && seed >= 0 && seed < 2 ** 32) && { path: 'seed', message: 'must be a whole number from 0 to 4294967295' },
    confidence !== undefined && !(confidence >= 0.5 && confidence <= 0.9999) && { path: 'confidence', message: 'must lie between 0.5 and 0.9999' },
  ].filter(problem => problem !== false)
  if (problems.length > 0) throw new ScienceError('unusable-input', problems)
}
