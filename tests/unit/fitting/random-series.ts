import fc from 'fast-check'
import { seededRandom } from '#shared/science/random'
import type { Point } from '#shared/science/fitting'

/** A series as a careless or a careful chemist might measure it: any ladder, any binding, any scatter. */
export const randomSeries: fc.Arbitrary<Point[]> = fc.record({
  n: fc.integer({ min: 4, max: 20 }),
  hasBlank: fc.boolean(),
  ladder: fc.constantFrom('even', 'doubling', 'scattered'),
  highest: fc.double({ min: -2, max: 1, noNaN: true }),
  reach: fc.double({ min: -1.5, max: 1.5, noNaN: true }),
  bmax: fc.double({ min: -6, max: 6, noNaN: true }),
  c: fc.double({ min: -30, max: 3, noNaN: true }),
  noise: fc.double({ min: -3, max: -0.3, noNaN: true }),
  seed: fc.integer({ min: 1, max: 2 ** 31 }),
}).map(({ n, hasBlank, ladder, highest, reach, bmax, c, noise, seed }) => {
  const random = seededRandom(seed)
  const xMax = 10 ** highest
  const k = 10 ** reach / xMax
  const places = Array.from({ length: n }, (_, i) => {
    const step = i + 1
    if (ladder === 'even') return xMax * step / n
    if (ladder === 'doubling') return xMax * 2 ** ((step - n) / 2)
    return xMax * (0.02 + 0.98 * random.uniform())
  })
  if (hasBlank) places[0] = 0
  return places.map((x) => {
    const y = 31 + c * x / xMax + bmax * k * x / (1 + k * x) + 10 ** noise * random.normal()
    return { x, y: Math.round(y * 1e4) / 1e4 }
  })
})
