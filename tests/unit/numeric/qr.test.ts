import { describe, expect, it } from 'vitest'
import { backSubstitute, invertTriangle, isDeficient, scaledSingularValues, triangularize } from '#shared/science/numeric/qr'

const columns = () => Float64Array.of(1, 1, 1, 1, 0, 1, 2, 3)

describe('triangularize', () => {
  it('solves least squares', () => {
    const a = columns()
    const b = Float64Array.of(1, 3, 5, 7)
    triangularize(a, 4, 2, b)
    backSubstitute(a, 4, 2, b, b)
    expect([...b.slice(0, 2)]).toEqual([expect.closeTo(1, 12), expect.closeTo(2, 12)])
  })

  it('gives the inverse of R', () => {
    const a = columns()
    triangularize(a, 4, 2, new Float64Array(4))
    const inverse = invertTriangle(a, 4, 2)
    expect(inverse[0]! * a[0]!).toBeCloseTo(1, 12)
    expect(inverse[2]! * a[0]! + inverse[3]! * a[4]!).toBeCloseTo(0, 12)
  })
})

describe('dependence of columns', () => {
  it('is seen, whatever the scale of the columns', () => {
    const a = Float64Array.of(1, 2, 3, 1e9, 2e9, 3e9)
    triangularize(a, 3, 2, new Float64Array(3))
    expect(isDeficient(a, 3, 2, 1e-12)).toBe(true)
  })

  it('is measured on columns of unit length', () => {
    const a = Float64Array.of(1, 0, 0, 0, 1e6, 0)
    triangularize(a, 3, 2, new Float64Array(3))
    expect(scaledSingularValues(a, 3, 2)).toEqual({ largest: expect.closeTo(1, 12), smallest: expect.closeTo(1, 12) })
  })
})
