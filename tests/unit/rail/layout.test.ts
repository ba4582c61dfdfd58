import { describe, expect, it } from 'vitest'
import { chipGap, inRailOrder, layRail, railGeometries, type RailEntry } from '~~/components/chart/rail/layout'
import { signed } from '~~/components/chart/rail/signed'
import { layStrip } from '~~/components/chart/rail/strip'

const entry = (ion: string, value: number | null, half = 0.2): RailEntry => ({
  ion,
  value,
  lower: value === null ? null : value - half,
  upper: value === null ? null : value + half,
  standardError: value === null ? null : half / 1.96,
})

const entries = [
  entry('CO3^2-', -11.44), entry('SO4^2-', -9.05), entry('F^-', -6.32), entry('H2PO4^-', -6.34), entry('Cl^-', -3.57),
  entry('Br^-', -2.38), entry('NO3^-', -1.07), entry('I^-', -0.27), entry('ClO4^-', -0.24), entry('SCN^-', 1.03),
]
const stretch = { top: 52, bottom: 600 }

describe('inRailOrder', () => {
  it('runs from the highest value down, with those without a value at the foot', () => {
    const ordered = inRailOrder([entry('A^-', null), entry('B^-', -1), entry('C^-', 2)])
    expect(ordered.map(({ ion }) => ion)).toEqual(['C^-', 'B^-', 'A^-'])
  })
})

describe('layRail', () => {
  const ordered = inRailOrder(entries)

  it('puts each marker at its value: a higher shift stands higher', () => {
    const ys = layRail(ordered, railGeometries.plain, stretch).entries.map(placed => placed.mark!.y)
    expect(ys).toEqual([...ys].sort((a, b) => a - b))
  })

  it('keeps chips 34 px apart inside the rail', () => {
    const chips = layRail(ordered, railGeometries.plain, stretch).entries.map(placed => placed.chip)
    chips.slice(1).forEach((chip, index) => expect(chip - chips[index]!).toBeGreaterThanOrEqual(chipGap - 1e-9))
    expect(chips[0]).toBeGreaterThanOrEqual(stretch.top)
    expect(chips.at(-1)).toBeLessThanOrEqual(stretch.bottom)
  })

  it('steps markers aside whose whiskers overlap, and no others', () => {
    const { entries: placed } = layRail(ordered, railGeometries.mirrored, stretch)
    const aside = placed.filter(({ mark }) => mark!.x > railGeometries.mirrored.spine + 12).map(({ entry: { ion } }) => ion)
    expect(aside).toEqual(['I^-', 'H2PO4^-'])
  })

  it('ties the pairs whose order is not settled', () => {
    const { ties } = layRail(ordered, railGeometries.plain, stretch)
    expect(ties.map(({ first, last }) => [first, last])).toEqual([[1, 2], [6, 7]])
  })

  it('takes the rows beside it as places of its chips', () => {
    const rows = ordered.map((_, index) => 90 + index * 82)
    expect(layRail(ordered, railGeometries.mirrored, { ...stretch, rows }).entries.map(placed => placed.chip)).toEqual(rows)
  })

  it('gives an anion without a value a chip and no marker', () => {
    const placed = layRail(inRailOrder([entry('SCN^-', 1), entry('I^-', null)]), railGeometries.plain, stretch).entries
    expect(placed[1]).toMatchObject({ mark: null, entry: { ion: 'I^-' } })
    expect(placed[1]!.chip).toBeGreaterThan(placed[0]!.chip)
  })
})

describe('layStrip', () => {
  it('runs from lowers to raises and keeps formulas apart in that order', () => {
    const { entries: placed } = layStrip(entries, [20, 956])
    expect(placed[0]!.entry.ion).toBe('CO3^2-')
    placed.slice(1).forEach((next, index) => expect(next.label - placed[index]!.label).toBeGreaterThan(20))
  })

  it('lifts a marker into a second lane where whiskers overlap', () => {
    const lanes = layStrip(entries, [20, 956]).entries.map(({ entry: { ion }, lane }) => [ion, lane])
    expect(lanes.filter(([, lane]) => lane === 1).map(([ion]) => ion)).toEqual(['F^-', 'ClO4^-'])
  })
})

describe('signed', () => {
  it('says the sign with a true minus, and none of zero', () => {
    expect([signed(1.03), signed(-0.244), signed(-0.001), signed(-12, 0)]).toEqual(['+1.03', '−0.24', '0.00', '−12'])
  })
})
