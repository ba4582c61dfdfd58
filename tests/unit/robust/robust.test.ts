import { describe, expect, it } from 'vitest'
import { ScienceError } from '#shared/science/errors'
import { fit } from '#shared/science/fitting'
import { seededRandom } from '#shared/science/random'
import { fitErrorsInBoth } from '#shared/science/robust/errors-in-both'
import { fitRobust, robustKinds } from '#shared/science/robust/robust'

const curve = (x: number) => 31 - 4 * x + 3.85 * 4.6 * x / (1 + 4.6 * x)
const ladder = [0, 0, 0, 0.02, 0.05, 0.08, 0.12, 0.16, 0.2, 0.25, 0.3, 0.4, 0.5, 0.6, 0.8, 1]
const random = seededRandom(21)
const clean = ladder.map(x => ({ x, y: curve(x) + 0.03 * random.normal() }))
const spoilt = clean.map((point, i) => i === 12 ? { ...point, y: point.y - 0.6 } : point)
const estimates = ({ parameters }: { parameters: { estimate: number | null }[] }) => parameters.map(({ estimate }) => estimate!)

describe.each(robustKinds)('a robust fit by %s', (kind) => {
  it('stays near the truth where one reading is off, and says which', () => {
    const plain = estimates(fit({ model: 'linear-langmuir', points: spoilt }))
    const robust = fitRobust({ model: 'linear-langmuir', points: spoilt }, kind)
    const undisturbed = estimates(fit({ model: 'linear-langmuir', points: clean }))
    expect(robust.converged).toBe(true)
    expect(Math.abs(estimates(robust.fit)[3]! - undisturbed[3]!)).toBeLessThan(0.3 * Math.abs(plain[3]! - undisturbed[3]!))
    expect(robust.weights.indexOf(Math.min(...robust.weights))).toBe(12)
    expect(robust.weights.every(weight => weight >= 0 && weight <= 1)).toBe(true)
    expect(robust.scale).toBeLessThan(0.08)
  })

  it('is least squares where nothing is off', () => {
    const even = ladder.map((x, i) => ({ x, y: curve(x) + (i % 2 === 0 ? 0.02 : -0.02) }))
    const [robust, plain] = [estimates(fitRobust({ model: 'linear-langmuir', points: even }, kind).fit), estimates(fit({ model: 'linear-langmuir', points: even }))]
    robust.forEach((value, j) => expect(Math.abs(value - plain[j]!)).toBeLessThan(0.05 * Math.abs(plain[j]!)))
  })

  it('keeps the weights of the readings themselves', () => {
    const counted = spoilt.map((point, i) => ({ ...point, n: i % 3 + 1 }))
    const { fit: found } = fitRobust({ model: 'linear-langmuir', points: counted, weighting: 'replicates' }, kind)
    const unweighted = fitRobust({ model: 'linear-langmuir', points: spoilt }, kind).fit
    expect(estimates(found)[3]).not.toBeCloseTo(estimates(unweighted)[3]!, 6)
  })
})

describe('uncertain concentrations', () => {
  const uncertain = (sdX: (i: number) => number) => clean.map((point, i) => ({ ...point, sd: 0.03, sdX: sdX(i) }))
  const model = 'linear-langmuir' as const

  it('that are all but exact give the fit with exact ones', () => {
    const [both, exact] = [estimates(fitErrorsInBoth({ model, points: uncertain(() => 1e-9) }).fit), estimates(fit({ model, points: clean.map(point => ({ ...point, sd: 0.03 })) }))]
    both.forEach((value, j) => expect(Math.abs(value - exact[j]!)).toBeLessThan(1e-6 * Math.abs(exact[j]!)))
  })

  it('are exact where they are said to be', () => {
    const found = fitErrorsInBoth({ model, points: uncertain(i => i < 8 ? 0 : 0.01) })
    expect(found.moved.slice(0, 8)).toEqual(ladder.slice(0, 8))
  })

  it('let readings move towards the curve and never below 0', () => {
    const found = fitErrorsInBoth({ model, points: uncertain(() => 0.01) })
    expect(found.converged).toBe(true)
    expect(Math.min(...found.moved)).toBeGreaterThanOrEqual(0)
    const values = estimates(found.fit)
    const near = (x: number) => values[0]! + values[1]! * x + values[2]! * values[3]! * x / (1 + values[3]! * x)
    expect(found.distance).toBeLessThanOrEqual(clean.reduce((sum, { x, y }) => sum + ((y - near(x)) / 0.03) ** 2, 0))
  })

  it('end at the least distance: a step in any constant makes it longer', () => {
    const points = uncertain(i => 0.004 + 0.01 * ladder[i]!)
    const { fit: found, distance } = fitErrorsInBoth({ model, points })
    found.parameters.forEach(({ name, estimate, standardError }) => {
      for (const step of [-0.3, 0.3]) {
        const held = fitErrorsInBoth({ model, points, parameters: { [name]: { fixed: estimate! + step * standardError! } } })
        expect(held.distance).toBeGreaterThan(distance)
      }
    })
  })

  it('that are below 0 are refused in their place', () => {
    const points = uncertain(i => i === 4 ? -0.01 : 0.01)
    expect(() => fitErrorsInBoth({ model, points })).toThrow(ScienceError)
    expect(() => fitErrorsInBoth({ model, points })).toThrow(/points\.4\.sdX/)
  })
})
