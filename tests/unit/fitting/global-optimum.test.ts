import { describe, it } from 'vitest'
import { expectNeverWorse, expectSameInBothUnits } from './global-optimum'

describe('fit, on random series', () => {
  it('is never worse than an exhaustive search over K', () => {
    expectNeverWorse(500, 20_260_101)
  }, 60_000)

  it('gives the same constants whether x is in M or in mM', () => {
    expectSameInBothUnits(500, 20_260_102)
  })
})
