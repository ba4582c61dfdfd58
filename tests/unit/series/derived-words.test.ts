import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import { concentrationWords, energyWords, shiftWords } from '~~/components/series/page/derivedWords'
import { sampleSeries } from './sample'

const binding = sampleSeries().fit!
const line = fit({ model: 'linear', points: [0, 0.2, 0.4, 0.8].map(x => ({ x, y: 31 - 10 * x })) })

describe('what a fit comes to', () => {
  it('has the shift at a concentration with its uncertainty and sign', () => {
    expect(shiftWords(binding, 0.3)).toMatch(/^\+\d\.\d+\(\d+\) K$/)
    expect(shiftWords(binding, 2)).toMatch(/^−.* K \(beyond the readings\)$/)
    expect(shiftWords(line, 0.5)).toMatch(/^−5(\.0+)? K|^−5\.0/)
  })

  it('has both concentrations for a shift that the curve passes twice', () => {
    expect(concentrationWords(binding, 0.5)).toMatch(/^0\.0\d+\(\d+\) M and 0\.\d+\(\d+\) M$/)
    expect(concentrationWords(binding, 5)).toBe('not reached up to 3 M')
  })

  it('writes K as an energy where there is one', () => {
    expect(energyWords(binding)).toMatch(/^−\d\.\d+\(\d+\) kJ mol\^−1\^$/)
    expect(energyWords(line)).toBeNull()
  })
})
