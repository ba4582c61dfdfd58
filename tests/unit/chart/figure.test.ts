import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import { figureContent, type FigureSource } from '~~/components/chart/figure/content'
import { frameOf } from '~~/components/chart/figure/frame'
import { figureLayers, figureOption } from '~~/components/chart/figure/option'
import type { Shape } from '~~/components/chart/figure/shapes'
import type { FigureReading, Palette } from '~~/components/chart/figure/types'

/** Invented readings of the usual shape: raised at first, lowered later. */
const readings: FigureReading[] = [
  [0, 31.0], [0.02, 31.27], [0.05, 31.56], [0.12, 31.91], [0.2, 32.09], [0.3, 32.07], [0.4, 31.86], [0.6, 31.47], [0.7, 31.15], [1, 30.17],
].map(([x = 0, y = 0], index) => ({ number: index + 1, x, y }))

const binding = fit({ model: 'linear-langmuir', points: readings.map(({ x, y }) => ({ x, y })) })
const line = fit({ model: 'linear', points: readings.map(({ x, y }) => ({ x, y })) })

const palette: Palette = {
  paper: 'paper', ink: 'ink', ink2: 'ink2', rule: 'rule', hair: 'hair', error: 'error', haze: 'haze', hazeOpacity: 0.6, bandOpacity: 0.26, front: 'front',
}

function layersOf(source: Partial<FigureSource>, width = 720, height = 480) {
  const content = figureContent({ readings, fit: binding, ion: 'SCN^-', ...source })
  const frame = frameOf(content, width, height)
  const layers = figureLayers(content, frame, palette)
  return { frame, shapes: (name: string) => layers.find(layer => layer.name === name)?.shapes ?? [] }
}

function texts(shapes: readonly Shape[]): string[] {
  return shapes.flatMap(shape => shape.kind === 'text' ? [shape.runs.map(run => run.text).join('')] : [])
}

describe('figureLayers', () => {
  it('labels the curve with the ion at its end and marks where it turns, with uncertainties', () => {
    const words = texts(layersOf({}).shapes('words'))
    expect(words).toContain('SCN−')
    expect(words.find(word => word.startsWith('highest point'))).toMatch(/^highest point \+1\.0\d+\(\d\d\) K at 0\.2\d+\(\d\d\) M$/)
  })

  it('names both phases, cloudy above the curve when the system clouds on heating', () => {
    const { shapes } = layersOf({})
    const place = (word: string) => shapes('words').find(shape => shape.kind === 'text' && shape.runs[0]?.text === word) as Extract<Shape, { kind: 'text' }>
    expect(place('cloudy').y).toBeLessThan(place('clear').y)
  })

  it('puts the stipple below the curve when the system clouds on cooling', () => {
    const heights = (clouds: 'on-heating' | 'on-cooling') => layersOf({ clouds }).shapes('stipple')
      .flatMap(shape => shape.kind === 'path' ? [...shape.d.matchAll(/M[\d.]+ ([\d.]+)/g)].map(([, y]) => Number(y)) : [])
    const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length
    expect(mean(heights('on-cooling'))).toBeGreaterThan(mean(heights('on-heating')))
  })

  it('draws the curve dotted beyond the readings', () => {
    const inner = [...readings.slice(1, 7), { number: 8, x: 0.43, y: 31.8 }]
    const curves = layersOf({ readings: inner }).shapes('curve')
    expect(curves.map(shape => shape.kind === 'path' && shape.dash !== undefined)).toEqual([true, false, true])
  })

  it('draws blanks as grey rings and readings set aside with a slash', () => {
    const aside = [...readings, { number: 11, x: 0.5, y: 31.27, setAside: true, key: 'a' }]
    const drawn = layersOf({ readings: aside }).shapes('readings')
    expect(drawn.filter(shape => shape.kind === 'path' && shape.stroke === 'ink2')).toHaveLength(3)
    expect(texts(drawn)).toEqual(['a'])
  })

  it('stands a residual beyond its axis at the edge with its value and an arrow', () => {
    const aside = [...readings, { number: 11, x: 0.5, y: 31.27, setAside: true }]
    expect(texts(layersOf({ readings: aside }).shapes('residuals'))).toEqual([expect.stringMatching(/^−0\.4\d K ↓$/)])
  })

  it('draws an arrow where a reading only bounds the cloud point', () => {
    const bounded: FigureReading[] = [...readings, { number: 11, x: 0.9, y: 30, limit: 'below' }]
    const [all, some] = [layersOf({ readings: bounded }), layersOf({})]
    expect(all.shapes('readings').length - some.shapes('readings').length).toBe(2)
    expect(all.shapes('residuals')).toHaveLength(some.shapes('residuals').length)
  })

  it('draws the straight line only when it is asked for', () => {
    expect(layersOf({}).shapes('straight line')).toEqual([])
    expect(texts(layersOf({ straightLine: line }).shapes('straight line'))).toEqual(['straight line alone'])
  })

  it('marks a row that cannot be drawn on the axis', () => {
    expect(texts(layersOf({ gaps: [{ x: 0.8, text: 'row 10' }] }).shapes('words'))).toContain('row 10')
  })

  it.each([320, 358, 520, 720, 1100])('keeps every word inside a figure of %d px', (width) => {
    const { shapes } = layersOf({}, width, 400)
    for (const shape of shapes('words')) {
      if (shape.kind !== 'text') continue
      expect(shape.x).toBeGreaterThanOrEqual(0)
      expect(shape.x).toBeLessThanOrEqual(width)
    }
  })

  it('keeps axes, a sketched curve and the stipple when there is nothing to draw', () => {
    const { shapes } = layersOf({ readings: [], fit: null })
    expect(shapes('curve')).toHaveLength(1)
    expect(shapes('stipple').length).toBeGreaterThan(0)
    expect([...shapes('readings'), ...shapes('band'), ...shapes('residuals')]).toEqual([])
  })

  it('draws readings without a curve when none is supported', () => {
    const { shapes } = layersOf({ fit: null })
    expect(shapes('readings').length).toBeGreaterThan(0)
    expect([...shapes('curve'), ...shapes('stipple'), ...shapes('residuals')]).toEqual([])
  })

  it('gives the place of the residuals to the readings when there is no curve', () => {
    const { frame, shapes } = layersOf({ fit: null })
    expect(frame.main.height).toBeGreaterThan(layersOf({}).frame.main.height)
    expect(shapes('residual rules')).toEqual([])
    expect(texts(shapes('axis names')).join()).not.toContain('residual')
  })
})

describe('the axes', () => {
  it('share the concentration and tell it once, under the residuals', () => {
    const { frame, shapes } = layersOf({})
    expect(frame.residual).toMatchObject({ left: frame.main.left, width: frame.main.width })
    const labels = shapes('axes').flatMap(shape => shape.kind === 'text' && shape.align === 'center' ? [shape] : [])
    expect(texts(labels)).toEqual(['0.0', '0.2', '0.4', '0.6', '0.8', '1.0'])
    expect(labels.every(({ y }) => y > frame.residual.top + frame.residual.height)).toBe(true)
  })

  it('put each tick where its value is drawn', () => {
    const { frame, shapes } = layersOf({})
    const label = shapes('axes').find(shape => shape.kind === 'text' && shape.runs[0]?.text === '31')
    expect(label?.kind === 'text' && Math.abs(label.y - frame.y(31))).toBeLessThanOrEqual(0.5)
  })
})

describe('figureOption', () => {
  it('gives each layer a series, in drawing order, that answers no pointer', () => {
    const { series } = figureOption(figureContent({ readings, fit: binding, ion: 'SCN^-' }), 720, 480, palette) as { series: { id: string, silent: boolean, z: number }[] }
    const place = (id: string) => series.find(layer => layer.id === id)!.z
    expect(place('stipple')).toBeLessThan(place('band'))
    expect(place('curve')).toBeLessThan(place('readings'))
    expect(series.every(({ silent }) => silent)).toBe(true)
  })
})
