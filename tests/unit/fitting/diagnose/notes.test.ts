import { describe, expect, it } from 'vitest'
import { fit, type FitRequest, type NoteCode, type Point } from '#shared/science/fitting'
import { seededRandom } from '#shared/science/random'

const ladder = [0, 0.05, 0.1, 0.2, 0.3, 0.4, 0.6, 0.8, 1, 1.2]

function series(xs: number[], { k = 4, bmax = 3, c = -4, noise = 0.01, seed = 3 } = {}): Point[] {
  const random = seededRandom(seed)
  return xs.map(x => ({ x, y: 31 + c * x + bmax * k * x / (1 + k * x) + noise * random.normal() }))
}

function notesOf(points: Point[], changes: Partial<FitRequest> = {}) {
  return fit({ model: 'linear-langmuir', points, ...changes }).notes
}

const noteOf = (points: Point[], code: NoteCode, changes: Partial<FitRequest> = {}) => notesOf(points, changes).find(note => note.code === code)

describe('notes', () => {
  it('are silent on a good series', () => {
    expect(notesOf(series(ladder)).filter(({ severity }) => severity !== 'info')).toEqual([])
  })

  it('come most serious first', () => {
    const severities = notesOf(series([0.5, 0.6, 0.7, 0.8, 0.9, 1], { noise: 0.2 })).map(({ severity }) => severity)
    const order = ['problem', 'caution', 'info']
    expect(severities).toEqual([...severities].sort((a, b) => order.indexOf(a) - order.indexOf(b)))
  })

  it('name what stays determined when K runs to zero', () => {
    const points = ladder.map(x => ({ x, y: 31 - 4 * x + 0.5 * x ** 3 }))
    const note = noteOf(points, 'binding-not-identified')
    expect(note?.severity).toBe('problem')
    expect(note?.values).toMatchObject({ end: 'zero', T0: expect.any(Number), initialSlope: expect.any(Number), curvature: expect.any(Number) })
  })

  it('name the step and its error when K runs to infinity behind blanks', () => {
    const points = ladder.map((x, i) => ({ x, y: (x > 0 ? 33 : 31) - 4 * x + (x === 0.05 ? 0.05 : 0.01 * Math.sin(5 * i)) }))
    const result = fit({ model: 'linear-langmuir', points: [...points, { x: 0, y: 31.01 }] })
    expect(result.notes.find(({ code }) => code === 'binding-not-identified')?.values).toMatchObject({ end: 'infinity', Bmax: expect.closeTo(2, 1) })
    expect(result.parameters.map(({ name, estimate }) => [name, estimate === null])).toEqual([['T0', false], ['c', false], ['Bmax', false], ['K', true]])
    expect(result.covariance).toHaveLength(3)
  })

  it('say that only the product holds', () => {
    const note = noteOf(series(ladder.map(x => x / 4), { noise: 0.015, k: 3 }), 'holds-as-product')
    expect(note?.values.product).toEqual(expect.closeTo(9, -1))
    expect(note?.values.percent as number).toBeLessThanOrEqual(15)
  })

  it('say that K is weakly determined', () => {
    expect(noteOf(series(ladder, { k: 0.8, noise: 0.08 }), 'weakly-determined') ?? noteOf(series(ladder, { k: 0.8, noise: 0.08 }), 'binding-not-identified')).toBeDefined()
  })

  it('say where the ladder is short', () => {
    expect(noteOf(series(ladder.map(x => x / 6), { noise: 0.0001 }), 'saturation-not-reached')?.values).toMatchObject({ reach: expect.closeTo(0.8, 1), highest: expect.closeTo(0.2, 12) })
    expect(noteOf(series([0, 0.5, 0.6, 0.8, 1, 1.2, 1.4], { noise: 0.001 }), 'low-concentrations-missing')?.values.lowest).toBe(0.5)
    expect(noteOf(series(ladder.slice(1)), 'blank-missing')?.values.lowest).toBe(0.05)
    expect(noteOf(series(ladder).slice(0, 6), 'few-points')?.values).toEqual({ n: 6, parameters: 4, degreesOfFreedom: 2 })
  })

  it.each([0, 3, 5, 7])('point at reading %i when it is off the curve', (index) => {
    const points = series(ladder)
    points[index] = { x: points[index]!.x, y: points[index]!.y - 0.2 }
    expect(noteOf(points, 'one-point-decides')?.values).toMatchObject({ reading: index + 1, x: ladder[index] })
  })

  it('see a pattern in the residuals of the wrong model', () => {
    const xs = Array.from({ length: 24 }, (_, i) => i / 20)
    expect(noteOf(series(xs, { noise: 0.005 }), 'pattern-in-residuals', { model: 'linear' })?.values.runs).toBeLessThan(8)
  })

  it('see an outlier as a want of normality', () => {
    const points = series(Array.from({ length: 20 }, (_, i) => i / 19))
    points[10] = { x: points[10]!.x, y: points[10]!.y + 0.5 }
    expect(noteOf(points, 'not-normal')).toBeDefined()
  })

  it('see lack of fit between replicates, and beside absolute sds', () => {
    const twice = [...series(ladder, { seed: 1 }), ...series(ladder, { seed: 2 })]
    expect(noteOf(twice, 'lack-of-fit', { model: 'linear' })?.values.levels).toBe(10)
    expect(noteOf(twice, 'lack-of-fit')).toBeUndefined()
    const claimed = series(ladder).map(point => ({ ...point, sd: 0.001 }))
    expect(noteOf(claimed, 'lack-of-fit', { sdMeaning: 'absolute' })?.values.chiSquare).toBeGreaterThan(20)
  })

  it('see weights that leave few readings to decide', () => {
    const points = series(ladder).map((point, i) => ({ ...point, sd: i < 2 ? 0.001 : 0.1 }))
    expect(noteOf(points, 'weights-dominate')?.values.effective as number).toBeLessThan(3)
  })

  it('find no evidence of binding on a line, and say what would have shown', () => {
    const points = series(ladder, { bmax: 0, noise: 0.02, seed: 5 })
    const note = noteOf(points, 'no-evidence-of-binding')
    expect(note?.values.detectableBmax as number).toBeGreaterThan(0)
    expect(note?.values.deltaAicc as number).toBeLessThanOrEqual(0)
  })

  it('say when a maximum lies beyond the readings', () => {
    const note = noteOf(series(ladder.map(x => x / 4), { noise: 0.0005 }), 'extrapolated')
    expect(note).toMatchObject({ severity: 'info', values: { highest: 0.3 } })
  })

  it('say when a slip in a concentration would show above the scatter', () => {
    expect(noteOf(series(ladder, { c: -30 }), 'concentrations-taken-as-exact')).toMatchObject({ severity: 'info', values: { percent: 1 } })
  })
})
