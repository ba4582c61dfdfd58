import { describe, expect, it } from 'vitest'
import { ScienceError } from '#shared/science/errors'
import { fit } from '#shared/science/fitting'
import { seededRandom } from '#shared/science/random'
import { fitShared } from '#shared/science/shared-fits/fit-shared'
import type { SharedRequest, SharedResult, SharedSeries } from '#shared/science/shared-fits/types'

const binding = (T0: number, c: number, Bmax: number, K: number) => (x: number) => T0 + c * x + Bmax * K * x / (1 + K * x)
const ladder = [0.02, 0.05, 0.08, 0.12, 0.16, 0.2, 0.3, 0.4, 0.6, 0.8, 1]
const measure = (id: string, model: SharedSeries['model'], curve: (x: number) => number, seed: number, sd = 0.03): SharedSeries => {
  const random = seededRandom(seed)
  return { id, model, points: ladder.map(x => ({ x, y: curve(x) + sd * random.normal() })) }
}
const blanksOf = (level: number, seed: number, count = 3) => {
  const random = seededRandom(seed)
  return Array.from({ length: count }, () => ({ x: 0, y: level + 0.03 * random.normal() }))
}
const three: SharedRequest = {
  series: [measure('scn', 'linear-langmuir', binding(31, -4, 3.85, 4.6), 1), measure('i', 'linear-langmuir', binding(31, -6, 2.5, 3), 2), measure('cl', 'linear', x => 31 - 11 * x, 3)],
  ties: [{ parameter: 'T0', series: ['scn', 'i', 'cl'] }],
  blanks: [{ points: blanksOf(31, 9), series: ['scn', 'i', 'cl'] }],
}
const constant = (result: SharedResult, id: string, name: string) => result.series.find(one => one.id === id)!.parameters.find(one => one.name === name)!

/** Solves A·x = b for a small dense symmetric system: the reference the block elimination is held against. */
function inverseOf(matrix: readonly (readonly number[])[]): number[][] {
  const n = matrix.length
  const rows = matrix.map((row, i) => [...row, ...row.map((_, j) => Number(i === j))])
  for (let k = 0; k < n; k++) {
    const pivot = rows.slice(k).reduce((best, row, i) => Math.abs(row[k]!) > Math.abs(rows[best]![k]!) ? k + i : best, k)
    ;[rows[k], rows[pivot]] = [rows[pivot]!, rows[k]!]
    const head = rows[k]!.map(value => value / rows[k]![k]!)
    rows.forEach((row, i) => (rows[i] = i === k ? head : row.map((value, j) => value - row[k]! * head[j]!)))
  }
  return rows.map(row => row.slice(n))
}

/** The joint fit written out: all residuals as a function of the columns of the covariance. */
function residualsAt(request: SharedRequest, result: SharedResult, values: readonly number[]): number[] {
  const at = (id: string, name: string) => {
    const place = result.columns.findIndex(column => 'tie' in column ? request.ties[column.tie]!.parameter === name && request.ties[column.tie]!.series.includes(id) : column.series === id && column.parameter === name)
    return place < 0 ? 0 : values[place]!
  }
  const curve = (id: string, x: number) => {
    const k = at(id, 'K')
    return at(id, 'T0') + at(id, 'c') * x + at(id, 'Bmax') * k * x / (1 + k * x)
  }
  return [
    ...request.series.flatMap(({ id, points }) => points.map(({ x, y }) => y - curve(id, x))),
    ...(request.blanks ?? []).flatMap(({ points, series }) => points.map(({ y }) => y - at(series[0]!, 'T0'))),
  ]
}
const valuesOf = (result: SharedResult) => result.columns.map(column => 'tie' in column ? result.tied[column.tie]!.estimate! : constant(result, column.series, column.parameter).estimate!)

function derivatives(request: SharedRequest, result: SharedResult): number[][] {
  const values = valuesOf(result)
  return values.map((value, j) => {
    const h = 1e-6 * Math.max(Math.abs(value), 1e-2)
    const moved = (by: number) => residualsAt(request, result, values.map((one, i) => i === j ? one + by : one))
    const [up, down] = [moved(h), moved(-h)]
    return up.map((one, i) => (one - down[i]!) / (2 * h))
  })
}
const dot = (a: readonly number[], b: readonly number[]) => a.reduce((sum, value, i) => sum + value * b[i]!, 0)

describe('a shared fit', () => {
  const result = fitShared(three)

  it('converges to the least joint sum of squares: every derivative vanishes', () => {
    expect(result.converged).toBe(true)
    const residuals = residualsAt(three, result, valuesOf(result))
    expect(dot(residuals, residuals)).toBeCloseTo(result.residualSumOfSquares, 10)
    for (const column of derivatives(three, result)) {
      expect(Math.abs(dot(column, residuals)) / Math.sqrt(dot(column, column) * dot(residuals, residuals))).toBeLessThan(1e-7)
    }
  })

  it('has the joint covariance of all its constants, as the dense matrix gives it', () => {
    const columns = derivatives(three, result)
    const dense = inverseOf(columns.map(a => columns.map(b => dot(a, b))))
    const variance = result.residualSumOfSquares / result.degreesOfFreedom
    result.covariance!.forEach((row, i) => row.forEach((value, j) => {
      expect(Math.abs(value - variance * dense[i]![j]!)).toBeLessThan(1e-5 * variance * Math.sqrt(dense[i]![i]! * dense[j]![j]!))
    }))
  })

  it('counts a shared constant and a blank once', () => {
    expect(result.n).toBe(3 * ladder.length + 3)
    expect(result.degreesOfFreedom).toBe(result.n - (1 + 3 + 3 + 1))
    expect(result.tied).toHaveLength(1)
    expect(new Set(['scn', 'i', 'cl'].map(id => constant(result, id, 'T0').estimate)).size).toBe(1)
  })

  it('knows the shared level better than any series alone', () => {
    const alone = fit({ model: 'linear-langmuir', points: [...three.series[0]!.points, ...three.blanks![0]!.points] }).parameters[0]!
    expect(result.tied[0]!.standardError!).toBeLessThan(alone.standardError!)
  })

  it('does not depend on the order of the series', () => {
    const turned = fitShared({ ...three, series: [...three.series].reverse() })
    for (const { id, parameters } of result.series) {
      for (const { name, estimate } of parameters) expect(constant(turned, id, name).estimate! / estimate!).toBeCloseTo(1, 9)
    }
  })

  it('of one series without ties is the fit of that series', () => {
    const [only] = three.series
    const alone = fit({ model: only!.model, points: only!.points, intervals: 't' })
    const shared = fitShared({ series: [only!], ties: [] })
    alone.parameters.forEach(({ estimate, standardError, interval }, j) => {
      const found = shared.series[0]!.parameters[j]!
      expect(found.estimate! / estimate!).toBeCloseTo(1, 9)
      expect(found.standardError! / standardError!).toBeCloseTo(1, 7)
      expect(found.interval!.upper! / interval!.upper!).toBeCloseTo(1, 7)
    })
  })
})

describe('ties of other constants', () => {
  const pair = [measure('a', 'linear-langmuir', binding(31, -4, 3.85, 4.6), 4), measure('b', 'linear-langmuir', binding(30, -6, 2.5, 4.6), 5)] as const

  it('hold one K for two series, at no smaller a sum than apart', () => {
    const shared = fitShared({ series: [...pair], ties: [{ parameter: 'K', series: ['a', 'b'] }] })
    const apart = fitShared({ series: [...pair], ties: [] })
    expect(constant(shared, 'a', 'K')).toEqual(constant(shared, 'b', 'K'))
    expect(shared.residualSumOfSquares).toBeGreaterThanOrEqual(apart.residualSumOfSquares)
    expect(Math.abs(constant(shared, 'a', 'K').estimate! - 4.6)).toBeLessThan(4 * constant(shared, 'a', 'K').standardError!)
    expect(shared.degreesOfFreedom).toBe(apart.degreesOfFreedom + 1)
  })

  it('stand beside constants that are held', () => {
    const shared = fitShared({ series: [{ ...pair[0], parameters: { c: { fixed: -4 } } }, pair[1]], ties: [{ parameter: 'K', series: ['a', 'b'] }] })
    expect(constant(shared, 'a', 'c')).toMatchObject({ estimate: expect.closeTo(-4, 12), fixed: true, standardError: null })
  })

  it('take stated uncertainties at their word when they are absolute', () => {
    const stated = (series: SharedSeries, sd: number): SharedSeries => ({ ...series, points: series.points.map(point => ({ ...point, sd })) })
    const errors = [0.03, 0.06].map(sd => constant(fitShared({ series: pair.map(one => stated(one, sd)), ties: [{ parameter: 'K', series: ['a', 'b'] }], sdMeaning: 'absolute' }), 'a', 'K').standardError!)
    expect(errors[1]! / errors[0]!).toBeCloseTo(2, 6)
  })
})

describe('batches', () => {
  it('each have their level where only their own series share it', () => {
    const series = ['a', 'b', 'c', 'd'].map((id, i) => measure(id, 'linear', x => (i < 2 ? 31 : 30.5) - 10 * x, i + 20))
    const result = fitShared({ series, ties: [{ parameter: 'T0', series: ['a', 'b'] }, { parameter: 'T0', series: ['c', 'd'] }], blanks: [{ points: blanksOf(31, 1), series: ['a', 'b'] }, { points: blanksOf(30.5, 2), series: ['c', 'd'] }] })
    expect(result.tied.map(({ estimate }) => Math.round(estimate! * 10) / 10)).toEqual([31, 30.5])
    expect(Math.abs(result.covariance![0]![1]!)).toBeLessThan(1e-18)
  })

  it('of sixty series come out together', () => {
    const series = Array.from({ length: 60 }, (_, i) => measure(`s${i}`, 'linear-langmuir', binding(31 + Math.floor(i / 10) / 10, -4 - i % 7, 3, 3 + i % 5), i + 100))
    const ids = (batch: number) => series.slice(10 * batch, 10 * batch + 10).map(({ id }) => id)
    const batches = Array.from({ length: 6 }, (_, batch) => batch)
    const result = fitShared({ series, ties: batches.map(batch => ({ parameter: 'T0', series: ids(batch) })), blanks: batches.map(batch => ({ points: blanksOf(31 + batch / 10, batch), series: ids(batch) })) })
    expect(result.converged).toBe(true)
    result.tied.forEach(({ estimate, standardError }, batch) => expect(Math.abs(estimate! - 31 - batch / 10)).toBeLessThan(4.5 * standardError!))
  })
})

describe('what cannot be shared', () => {
  const faults = (request: SharedRequest) => {
    try {
      fitShared(request)
    }
    catch (error) {
      if (error instanceof ScienceError) return error.problems.map(({ path }) => path)
    }
    return []
  }

  it.each<[string, Partial<SharedRequest>, string]>([
    ['a tie to a series that is not there', { ties: [{ parameter: 'T0', series: ['scn', 'nobody'] }] }, 'ties.0.series'],
    ['a constant that the model does not have', { ties: [{ parameter: 'K', series: ['scn', 'cl'] }] }, 'ties.0.parameter'],
    ['a tie of one', { ties: [{ parameter: 'T0', series: ['scn'] }], blanks: [] }, 'ties.0.series'],
    ['two ties of one constant', { ties: [{ parameter: 'T0', series: ['scn', 'i'] }, { parameter: 'T0', series: ['i', 'cl'] }], blanks: [] }, 'ties.1.series'],
    ['a constant held and tied', { series: three.series.map((one, s) => s === 0 ? { ...one, parameters: { T0: { fixed: 31 } } } : one) }, 'ties.0.parameter'],
    ['blanks of series with levels of their own', { ties: [{ parameter: 'T0', series: ['scn', 'i'] }] }, 'blanks.0.series'],
    ['blanks with salt', { blanks: [{ points: [{ x: 0.1, y: 31 }], series: ['scn', 'i', 'cl'] }] }, 'blanks.0.points.0.x'],
    ['two series of one id', { series: [...three.series, three.series[0]!] }, 'series.3.id'],
    ['readings that are too few', { series: [{ ...three.series[0]!, points: three.series[0]!.points.slice(0, 2) }, ...three.series.slice(1)] }, 'series.0.points'],
    ['nothing', { series: [], ties: [], blanks: [] }, 'series'],
  ])('%s is refused in its place', (_, part, path) => expect(faults({ ...three, ...part })).toContain(path))
})
