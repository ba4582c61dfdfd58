import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { spread } from '~~/components/chart/rail/spread'

const chipGap = 34
// Sums of a few dozen pixel values in doubles.
const roundingSlack = 1e-7

const movement = (wanted: readonly number[], placed: readonly number[]) =>
  wanted.reduce((sum, place, index) => sum + (place - placed[index]!) ** 2, 0)

const sortedPlaces = fc.array(fc.double({ min: -500, max: 1500, noNaN: true }), { maxLength: 14 })
  .map(places => places.sort((a, b) => a - b))

describe('spread', () => {
  it('gives nothing for nothing and leaves one where it wants to be', () => {
    expect(spread([], chipGap)).toEqual([])
    expect(spread([12], chipGap)).toEqual([12])
  })

  it('leaves places alone that are far enough apart', () => {
    expect(spread([0, 34, 100], chipGap)).toEqual([0, 34, 100])
  })

  it('moves two that share a place apart to both sides', () => {
    expect(spread([50, 50], chipGap)).toEqual([33, 67])
  })

  it('takes a gap of its own for each pair', () => {
    expect(spread([0, 0, 0], [12, 18])).toEqual([-14, -2, 16])
  })

  it('stays inside the stretch it is given', () => {
    expect(spread([-20, 5, 200], chipGap, [0, 120])).toEqual([0, 34, 120])
  })

  it('starts at the first end when the stretch is too short for all', () => {
    expect(spread([10, 20, 30], chipGap, [0, 40])).toEqual([0, 34, 68])
  })

  it('never leaves two closer than the gap and never changes their order', () => {
    fc.assert(fc.property(sortedPlaces, (wanted) => {
      const placed = spread(wanted, chipGap)
      placed.slice(1).forEach((place, index) => expect(place - placed[index]!).toBeGreaterThanOrEqual(chipGap - roundingSlack))
    }), { seed: 20261, numRuns: 500 })
  })

  it('moves no further than any other arrangement that keeps order and gaps', () => {
    const arrangement = fc.tuple(sortedPlaces, fc.array(fc.double({ min: 0, max: 60, noNaN: true }), { minLength: 14, maxLength: 14 }), fc.double({ min: -600, max: 1600, noNaN: true }))
    fc.assert(fc.property(arrangement, ([wanted, extra, start]) => {
      let place = start
      const other = wanted.map((_, index) => index === 0 ? place : (place += chipGap + extra[index]!))
      const placed = spread(wanted, chipGap)
      expect(movement(wanted, placed)).toBeLessThanOrEqual(movement(wanted, other) + roundingSlack)
      // Any step from ours towards the other stays allowed; none of them may be shorter.
      const nearby = placed.map((value, index) => value + 0.01 * (other[index]! - value))
      expect(movement(wanted, placed)).toBeLessThanOrEqual(movement(wanted, nearby) + roundingSlack)
    }), { seed: 20262, numRuns: 500 })
  })
})
