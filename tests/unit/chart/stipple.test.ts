import { describe, expect, it } from 'vitest'
import { dotsPath, stipple, type StippleLayer } from '~~/components/chart/figure/stipple'

const area = { left: 0, top: 0, right: 200, bottom: 200 }

function dots(layers: StippleLayer[]) {
  return layers.flatMap(layer => layer.dots.map(([x, y]) => ({ x, y, radius: layer.radius })))
}

describe('stipple', () => {
  it('stays on the cloudy side of the curve and within its reach', () => {
    const above = dots(stipple({ area, curve: () => 120, side: 'above' }))
    expect(above.length).toBeGreaterThan(100)
    expect(above.every(({ y }) => y < 120 && y > 120 - 76)).toBe(true)
    expect(dots(stipple({ area, curve: () => 60, side: 'below' })).every(({ y }) => y > 60 && y < 60 + 76)).toBe(true)
  })

  it('has its largest dots at the curve and none larger than 1.25 px', () => {
    const all = dots(stipple({ area, curve: () => 120, side: 'above' })).sort((a, b) => b.y - a.y)
    expect(all[0]!.radius).toBeGreaterThan(all.at(-1)!.radius)
    expect(Math.max(...all.map(({ radius }) => radius))).toBeLessThanOrEqual(1.25 + 1e-9)
  })

  it('stands on a hexagonal grid of 6.5 px', () => {
    const rows = new Map<number, number[]>()
    for (const { x, y } of dots(stipple({ area, curve: () => 120, side: 'above' }))) rows.set(y, [...(rows.get(y) ?? []), x])
    const [first, second] = [...rows].sort(([a], [b]) => a - b).map(([, xs]) => xs.sort((a, b) => a - b))
    expect(first![1]! - first![0]!).toBeCloseTo(6.5, 0)
    expect(Math.abs(second![0]! - first![0]!) % 6.5).toBeCloseTo(3.25, 0)
  })

  it('parts around text by 5 px sideways and 1 px up and down', () => {
    const box = { left: 80, top: 70, right: 120, bottom: 85 }
    const all = dots(stipple({ area, curve: () => 120, side: 'above', boxes: [box] }))
    expect(all.some(({ x, y }) => x > 75 && x < 125 && y > 69 && y < 86)).toBe(false)
    expect(all.some(({ x, y }) => x > 65 && x <= 75 && y > 69 && y < 86)).toBe(true)
  })

  it('has no dots where there is no curve', () => {
    expect(stipple({ area, curve: () => NaN, side: 'above' })).toEqual([])
  })
})

describe('dotsPath', () => {
  it('starts each row anew and goes on by the distance between neighbours', () => {
    expect(dotsPath([[1, 2], [7.5, 2], [4.25, 7.63]])).toBe('M1.0 2.0h0.01m6.49 0h0.01M4.3 7.6h0.01')
  })

  it('is empty without dots', () => {
    expect(dotsPath([])).toBe('')
  })
})
