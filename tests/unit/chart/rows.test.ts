import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import { figureContent } from '~~/components/chart/figure/content'
import { frameOf } from '~~/components/chart/figure/frame'
import { nearestReading } from '~~/components/chart/figure/nearest'
import { figureCsv, figureRows, standing } from '~~/components/chart/figure/rows'

const readings = [{ number: 1, x: 0.4, y: 29 }, { number: 2, x: 0, y: 31 }, { number: 3, x: 0.2, y: 30.02, setAside: true }]
const content = figureContent({ readings, fit: fit({ model: 'linear', points: [{ x: 0, y: 31 }, { x: 0.2, y: 30 }, { x: 0.4, y: 29 }] }) })

describe('figureRows', () => {
  it('orders readings by concentration and says what the fit makes of each', () => {
    const rows = figureRows(content)
    expect(rows.map(row => row.number)).toEqual([2, 3, 1])
    expect(rows[1]!.fitted).toBeCloseTo(30, 8)
    expect(rows[1]!.residual).toBeCloseTo(0.02, 8)
  })

  it('leaves fit and residual empty without a curve', () => {
    expect(figureRows(figureContent({ readings, fit: null }))[0]).toMatchObject({ fitted: null, residual: null })
  })
})

describe('figureCsv', () => {
  it('has a head, a line for each reading and says which are set aside', () => {
    const lines = figureCsv(figureRows(content)).trimEnd().split('\r\n')
    expect(lines).toHaveLength(4)
    expect(lines[0]).toMatch(/^number,concentration/)
    expect(lines[2]).toMatch(/^3,0\.2,30\.02,.*set aside$/)
  })
})

describe('standing', () => {
  it.each([
    [{ number: 1, x: 0.1, y: 4, limit: 'below' as const }, 'cloud point lies below'],
    [{ number: 1, x: 0, y: 31 }, 'blank'],
    [{ number: 1, x: 0.1, y: 31 }, ''],
  ])('of %j is %j', (reading, words) => {
    expect(standing(reading)).toBe(words)
  })
})

describe('nearestReading', () => {
  const frame = frameOf(content, 600, 400)

  it('follows the column under the pointer', () => {
    expect(nearestReading(readings, frame, frame.x(0.21), 390)).toBe(2)
  })

  it('has none without readings', () => {
    expect(nearestReading([], frame, 10, 10)).toBe(-1)
  })
})
