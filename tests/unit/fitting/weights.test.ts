import { describe, expect, it } from 'vitest'
import { fit, type Point } from '#shared/science/fitting'

const xs = [0, 0.1, 0.2, 0.4, 0.6, 0.8, 1, 1.2]
const readings = (more: (i: number) => Partial<Point> = () => ({})): Point[] => xs.map((x, i) => ({ x, y: 31 - 4 * x + 12 * x / (1 + 4 * x) + 0.02 * Math.sin(9 * i), ...more(i) }))
const weightingOf = (points: Point[]) => fit({ model: 'linear', points }).weighting

describe('weighting', () => {
  it('is none without sds and counts', () => {
    expect(weightingOf(readings())).toBe('none')
  })

  it('is by sd only where no reading has an sd from fewer than six samples', () => {
    expect(weightingOf(readings(() => ({ sd: 0.05 })))).toBe('sd')
    expect(weightingOf(readings(() => ({ sd: 0.05, n: 6 })))).toBe('sd')
    expect(weightingOf(readings(i => ({ sd: 0.05, n: i === 3 ? 5 : 6 })))).toBe('replicates')
    expect(weightingOf(readings(i => (i === 3 ? {} : { sd: 0.05 })))).toBe('none')
  })

  it('is by sd when sds are absolute', () => {
    const result = fit({ model: 'linear', points: readings(() => ({ sd: 0.05, n: 3 })), sdMeaning: 'absolute' })
    expect(result).toMatchObject({ weighting: 'sd', sdMeaning: 'absolute' })
  })

  it('counts a reading of two samples like the reading given twice', () => {
    const weighted = fit({ model: 'linear-langmuir', points: readings(i => ({ n: i % 2 + 1 })), intervals: 't' })
    const repeated = fit({ model: 'linear-langmuir', points: readings().flatMap((point, i) => i % 2 ? [point, point] : [point]), intervals: 't' })
    weighted.parameters.forEach(({ estimate }, j) => expect(estimate!).toBeCloseTo(repeated.parameters[j]!.estimate!, 9))
    expect(weighted.residualSumOfSquares).toBeCloseTo(repeated.residualSumOfSquares, 12)
  })

  it('does not depend on the size of relative sds', () => {
    const fine = fit({ model: 'linear-langmuir', points: readings(i => ({ sd: 0.01 * (i + 1) })) })
    const coarse = fit({ model: 'linear-langmuir', points: readings(i => ({ sd: 10 * (i + 1) })) })
    fine.parameters.forEach(({ standardError }, j) => expect(standardError!).toBeCloseTo(coarse.parameters[j]!.standardError!, 9))
  })

  it('warns of sds from few samples that somebody chose', () => {
    const { notes } = fit({ model: 'linear', points: readings(() => ({ sd: 0.05, n: 3 })), weighting: 'sd' })
    expect(notes.find(({ code }) => code === 'weights-from-few-replicates')?.values).toEqual({ fewest: 3, needed: 6 })
  })
})
