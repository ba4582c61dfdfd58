import { describe, expect, it } from 'vitest'
import { fit, type NoteCode } from '#shared/science/fitting'
import { seededRandom } from '#shared/science/random'

const seriesCount = 400
const seed = 20_260_301
/** Scatter beside Bmax: 0.01 K on a plateau of 3 K. At K·x_max near 1 more scatter leaves K truly undetermined. */
const scatter = 0.003

/** A clean series: true model, constant noise, 8 to 20 evenly spaced points with a blank, K·x_max from 1 to 5. */
function cleanSeries(random: ReturnType<typeof seededRandom>) {
  const n = 8 + Math.floor(13 * random.uniform())
  const reach = 1 + 4 * random.uniform()
  const bmax = 1 + 6 * random.uniform()
  const c = -1 - 8 * random.uniform()
  return Array.from({ length: n }, (_, i) => {
    const x = i / (n - 1)
    return { x, y: 31 + c * x + bmax * reach * x / (1 + reach * x) + scatter * bmax * random.normal() }
  })
}

describe('diagnose, on clean series', () => {
  it('shows a caution on at most one in ten', () => {
    const random = seededRandom(seed)
    const counts = new Map<NoteCode, number>()
    let withCaution = 0
    for (let i = 0; i < seriesCount; i++) {
      const cautions = fit({ model: 'linear-langmuir', points: cleanSeries(random) }).notes.filter(({ severity }) => severity !== 'info')
      if (cautions.length > 0) withCaution++
      for (const { code } of cautions) counts.set(code, (counts.get(code) ?? 0) + 1)
    }
    expect(withCaution / seriesCount, JSON.stringify([...counts])).toBeLessThanOrEqual(0.1)
  }, 60_000)
})
