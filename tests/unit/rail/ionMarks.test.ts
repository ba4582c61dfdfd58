import { describe, expect, it } from 'vitest'
import { furtherAnions } from '#shared/science/chemistry/ions'
import { halfPath, ionMarks, markOf, markShapes, outlinePath } from '~~/components/chart/ionMarks'

describe('ionMarks', () => {
  it('gives neighbours on the scale different marks', () => {
    const looks = ionMarks.map(mark => `${mark.shape} ${mark.fill}`)
    expect(new Set(looks).size).toBe(ionMarks.length)
  })

  it('repeats the scale by the fill: filled strongly, half between, open weakly hydrated', () => {
    const fills = ionMarks.map(mark => mark.fill)
    expect(fills).toEqual([...fills].sort((a, b) => ['filled', 'half', 'open'].indexOf(a) - ['filled', 'half', 'open'].indexOf(b)))
  })

  it('marks an anion outside the table with a shape no other uses, in a colour outside the scale', () => {
    for (const { formula } of furtherAnions) {
      expect(ionMarks.map(mark => mark.shape)).not.toContain(markOf(formula).shape)
      expect(ionMarks.map(mark => mark.variable)).not.toContain(markOf(formula).variable)
    }
  })

  it.each(markShapes)('draws a closed path for a %s', (shape) => {
    expect(outlinePath(shape, 7, 7, 4)).toMatch(/^M[-\d. aLZ]+Z$/)
    expect(halfPath(shape, 7, 7, 4)).toMatch(/^M[-\d. aLZ]+Z$/)
  })
})
