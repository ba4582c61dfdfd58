import { describe, it } from 'vitest'
import { expectNeverWorse, expectSameInBothUnits } from '../unit/fitting/global-optimum'

describe('fit, on ten thousand random series', () => {
  it('is never worse than an exhaustive search over K', () => {
    expectNeverWorse(10_000, 20_260_201)
  })

  it('gives the same constants whether x is in M or in mM', () => {
    expectSameInBothUnits(10_000, 20_260_202)
  })
})
