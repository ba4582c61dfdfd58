import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { axisParts } from '~~/components/chart/rail/axisBreak'
import { assignLanes } from '~~/components/chart/rail/lanes'
import { linearScale, niceSpan, ticks } from '~~/components/chart/rail/scale'
import { spineStipple } from '~~/components/chart/rail/stipple'
import { differ, findTies } from '~~/components/chart/rail/ties'

describe('linearScale', () => {
  it('maps the ends and comes back from every pixel', () => {
    const scale = linearScale([-12, 2], [854, 52])
    expect(scale.pixel(-12)).toBe(854)
    expect(scale.pixel(2)).toBe(52)
    expect(scale.value(scale.pixel(0.3))).toBeCloseTo(0.3, 12)
  })

  it('puts a span without width in the middle', () => {
    expect(linearScale([3, 3], [0, 100]).pixel(3)).toBe(50)
  })
})

describe('ticks', () => {
  it('are round, in order and inside the span', () => {
    expect(ticks([-12.4, 2.3], 8)).toEqual([-12, -10, -8, -6, -4, -2, 0, 2])
    expect(ticks([0, 1], 2)).toEqual([0, 0.5, 1])
    expect(ticks([0, 0.3], 3)).toEqual([0, 0.1, 0.2, 0.3])
  })

  it('widen a span to round ends', () => {
    expect(niceSpan([-11.9, 1.3], 8)).toEqual([-12, 2])
  })
})

describe('assignLanes', () => {
  it('keeps stretches that do not meet in the first lane', () => {
    expect(assignLanes([{ from: 0, to: 5 }, { from: 6, to: 9 }], 3)).toEqual([0, 0])
  })

  it('steps aside for one that overlaps, whichever way its ends are given', () => {
    expect(assignLanes([{ from: 0, to: 5 }, { from: 9, to: 4 }, { from: 3, to: 6 }], 3)).toEqual([0, 1, 2])
  })

  it('uses the lane of least overlap when all are taken', () => {
    expect(assignLanes([{ from: 0, to: 9 }, { from: 0, to: 4 }, { from: 3, to: 9 }], 2)).toEqual([0, 1, 1])
  })

  it('keeps the clearance it is asked for', () => {
    expect(assignLanes([{ from: 0, to: 5 }, { from: 6, to: 9 }], 2, 3)).toEqual([0, 1])
  })
})

describe('findTies', () => {
  const differsBeyond = (values: readonly number[], limit: number) => (a: number, b: number) => Math.abs(values[a]! - values[b]!) > limit

  it('finds none among one, or where all differ', () => {
    expect(findTies(1, () => false)).toEqual([])
    expect(findTies(3, () => true)).toEqual([])
  })

  it('spans all where no pair differs', () => {
    expect(findTies(4, () => false)).toEqual([{ first: 0, last: 3, lane: 0 }])
  })

  it('uses one lane for runs apart and a second for runs that share a member', () => {
    expect(findTies(5, differsBeyond([0, 1, 5, 6, 7], 1))).toEqual([
      { first: 0, last: 1, lane: 0 }, { first: 2, last: 3, lane: 0 }, { first: 3, last: 4, lane: 1 },
    ])
  })

  it('spans only runs in which no pair differs, and none that could be longer', () => {
    const values = fc.array(fc.double({ min: 0, max: 10, noNaN: true }), { minLength: 2, maxLength: 10 }).map(v => v.sort((a, b) => a - b))
    fc.assert(fc.property(values, (ordered) => {
      const differs = differsBeyond(ordered, 1)
      const tied = findTies(ordered.length, differs)
      for (const { first, last } of tied) {
        expect(differs(first, last)).toBe(false)
        if (first > 0) expect(differs(first - 1, last)).toBe(true)
        if (last + 1 < ordered.length) expect(differs(first, last + 1)).toBe(true)
      }
      for (let place = 1; place < ordered.length; place++) {
        const covered = tied.some(({ first, last }) => first < place && last >= place)
        expect(covered).toBe(!differs(place - 1, place))
      }
    }), { seed: 20263, numRuns: 300 })
  })
})

describe('differ', () => {
  it('asks for 1.96 standard errors of the difference', () => {
    expect(differ({ value: 0, standardError: 0.3 }, { value: 1, standardError: 0.4 })).toBe(true)
    expect(differ({ value: 0, standardError: 0.3 }, { value: 0.97, standardError: 0.4 })).toBe(false)
  })

  it('never says so of a value whose error is not known', () => {
    expect(differ({ value: 0, standardError: null }, { value: 9, standardError: 0.1 })).toBe(false)
  })
})

describe('axisParts', () => {
  const extent = (value: number) => ({ lower: value - 0.3, upper: value + 0.3 })

  it('keeps one axis where values stand close', () => {
    expect(axisParts([3, 2.4, 1.8, 1].map(extent))).toHaveLength(1)
  })

  it('starts again at the widest gap', () => {
    const parts = axisParts([1, 0, -1, -6, -7, -8].map(extent))
    expect(parts.map(({ first, last }) => [first, last])).toEqual([[0, 2], [3, 5]])
    expect(parts[1]!.span).toEqual([-8.3, -5.7])
  })

  it('never leaves one entry alone on an axis', () => {
    expect(axisParts([1, 0, -1, -9].map(extent))).toHaveLength(1)
  })

  it('gives nothing for nothing', () => {
    expect(axisParts([])).toEqual([])
  })
})

describe('spineStipple', () => {
  it('grows from nothing to dense towards the end that lowers', () => {
    const steps = spineStipple({ across: [0, 10], along: [0, 300] })
    const diameters = steps.map(step => step.diameter)
    expect(diameters).toEqual([...diameters].sort((a, b) => a - b))
    expect(diameters[0]).toBeLessThan(0.7)
    expect(diameters.at(-1)).toBeGreaterThan(2)
  })

  it('stays inside the spine', () => {
    const text = spineStipple({ across: [5, 15], along: [100, 0], lying: true }).map(step => step.path).join('')
    for (const [, x, y] of text.matchAll(/M(\S+) (\S+)h0/g)) {
      expect(Number(x)).toBeGreaterThanOrEqual(0)
      expect(Number(x)).toBeLessThanOrEqual(100)
      expect(Number(y)).toBeGreaterThanOrEqual(5)
      expect(Number(y)).toBeLessThanOrEqual(15)
    }
  })
})
