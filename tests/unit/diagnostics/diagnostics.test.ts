import { describe, expect, it } from 'vitest'
import { estimateOf, influenceOn } from '#shared/science/diagnostics/influence'
import type { NamedRequest } from '#shared/science/fitting/types'
import { normalQuantiles } from '#shared/science/diagnostics/normal-quantiles'
import { tradeContour } from '#shared/science/diagnostics/trade-contour'
import { fit } from '#shared/science/fitting'
import { seededRandom } from '#shared/science/random'

const random = seededRandom(11)
const curve = (x: number) => 31 - 4 * x + 3.8 * 4.7 * x / (1 + 4.7 * x)
const points = [0, 0, 0.02, 0.05, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.8, 1].map(x => ({ x, y: curve(x) + 0.04 * random.normal() }))
const request: NamedRequest = { model: 'linear-langmuir', weighting: 'none', points }

describe('normalQuantiles', () => {
  it('puts residuals in order against symmetric quantiles', () => {
    const placed = normalQuantiles([0.2, -0.1, 0], 0.1)
    expect(placed.map(({ observed }) => observed)).toEqual([-1, 0, 2])
    expect(placed[1]!.expected).toBeCloseTo(0, 12)
    expect(placed[0]!.expected).toBeCloseTo(-placed[2]!.expected, 12)
  })

  it('gives nothing for nothing', () => {
    expect(normalQuantiles([], 1)).toEqual([])
  })
})

describe('influenceOn', () => {
  it('finds that a reading far off its line pulls the slope most', () => {
    const line: NamedRequest = { model: 'linear', weighting: 'none', points: [0, 1, 2, 3, 4, 5].map(x => ({ x, y: 31 - x + (x === 5 ? 1 : 0.01 * (x % 2)) })) }
    const slope = fit(line).parameters.find(({ name }) => name === 'c')!
    const shifts = influenceOn('c', line, slope.estimate!, slope.standardError!).map(({ shift }) => Math.abs(shift!))
    expect(shifts.indexOf(Math.max(...shifts))).toBe(5)
  })

  it('is the difference that leaving a reading out makes', () => {
    const K = fit(request).parameters.find(({ name }) => name === 'K')!
    const [first] = influenceOn('K', request, K.estimate!, K.standardError!)
    const without = estimateOf({ ...request, points: points.slice(1) }, 'K')!
    expect(first!.shift).toBeCloseTo((K.estimate! - without) / K.standardError!, 9)
  })

  it('says nothing of a reading the fit cannot do without', () => {
    const two: NamedRequest = { model: 'linear', weighting: 'none', points: [{ x: 0, y: 31 }, { x: 0, y: 31.1 }, { x: 1, y: 30 }] }
    expect(influenceOn('c', two, -1, 0.1)[2]!.shift).toBeNull()
  })
})

describe('tradeContour', () => {
  const weighted = points.map(point => ({ ...point, weight: 1 }))
  const result = fit(request)
  const valueOf = (name: string) => result.parameters.find(parameter => parameter.name === name)!.estimate!
  const contour = tradeContour(weighted, valueOf('K'), 0.95)

  it('closes around the estimate', () => {
    expect(contour.isClosed).toBe(true)
    const middle = contour.slices.reduce((best, slice) => Math.abs(slice.K - valueOf('K')) < Math.abs(best.K - valueOf('K')) ? slice : best)
    expect(middle.low).toBeLessThan(valueOf('Bmax'))
    expect(middle.high).toBeGreaterThan(valueOf('Bmax'))
  })

  it('lies where the sum of squares of a fit with both held is the level of the region', () => {
    // F(0.95; 2, 8) of the tables: 4.459.
    const level = result.residualSumOfSquares * (1 + 2 * 4.459 / 8)
    for (const { K, low, high } of contour.slices.filter((_, index) => index % 16 === 0)) {
      for (const Bmax of [low, high]) {
        const held = fit({ ...request, parameters: { K: { fixed: K }, Bmax: { fixed: Bmax } } })
        expect(held.residualSumOfSquares / level).toBeCloseTo(1, 3)
      }
    }
  })

  it('holds the smaller region of a lower level', () => {
    const inner = tradeContour(weighted, valueOf('K'), 0.68)
    expect(inner.slices[0]!.K).toBeGreaterThan(contour.slices[0]!.K)
    expect(inner.slices.at(-1)!.K).toBeLessThan(contour.slices.at(-1)!.K)
  })

  it('says when the region does not close', () => {
    const flat = [0, 0, 0.1, 0.2, 0.3, 0.4, 0.5].map((x, index) => ({ x, y: 31 - 2 * x + (index % 2 ? 0.2 : -0.2), weight: 1 }))
    expect(tradeContour(flat, 3, 0.95).isClosed).toBe(false)
  })
})
