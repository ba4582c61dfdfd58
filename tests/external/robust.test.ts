import { describe, expect, it } from 'vitest'
import { fit } from '#shared/science/fitting'
import { fitErrorsInBoth } from '#shared/science/robust/errors-in-both'
import { fitRobust } from '#shared/science/robust/robust'

const estimates = ({ parameters }: { parameters: { estimate: number | null }[] }) => parameters.map(({ estimate }) => estimate!)

/** International telephone calls from Belgium, 1950 to 1973, tens of millions; six years were counted otherwise. Data from memory. */
const calls = [4.4, 4.7, 4.7, 5.9, 6.6, 7.3, 8.1, 8.8, 10.6, 12, 13.5, 14.9, 16.1, 21.2, 119, 124, 142, 159, 182, 212, 43, 24, 27, 29]
const telephone = { model: 'linear', points: calls.map((y, i) => ({ x: 50 + i, y })) } as const

/** Values of the worked example in Venables, Modern Applied Statistics (2002), section 6.5; from memory. */
describe('robust regression of the telephone calls', () => {
  it('starts from the published least squares', () => {
    const [intercept, slope] = estimates(fit(telephone))
    expect(intercept).toBeCloseTo(-260.059, 3)
    expect(slope).toBeCloseTo(5.041, 3)
  })

  it('by Huber agrees as far as the example was iterated', () => {
    const [intercept, slope] = estimates(fitRobust(telephone, 'huber').fit)
    // The example stops at a relative change of 1e-4, which leaves 0.1 % to go.
    expect(Math.abs(intercept! / -102.622 - 1)).toBeLessThan(2e-3)
    expect(Math.abs(slope! / 2.0414 - 1)).toBeLessThan(2e-3)
  })

  it('by Tukey agrees to the printed digits', () => {
    const [intercept, slope] = estimates(fitRobust(telephone, 'tukey').fit)
    expect(intercept).toBeCloseTo(-52.3025, 3)
    expect(slope).toBeCloseTo(1.098, 3)
  })
})

/** Pearson's points with York's weights; the solution is that of York, American Journal of Physics 72 (2004) 367. */
describe('the line with errors in both coordinates', () => {
  const x = [0, 0.9, 1.8, 2.6, 3.3, 4.4, 5.2, 6.1, 6.5, 7.4]
  const y = [5.9, 5.4, 4.4, 4.6, 3.5, 3.7, 2.8, 2.8, 2.4, 1.5]
  const weightX = [1000, 1000, 500, 800, 200, 80, 60, 20, 1.8, 1]
  const weightY = [1, 1.8, 4, 8, 20, 20, 70, 70, 100, 500]
  /** Concentrations cannot be negative here and one point moves below 0: the whole ladder stands 10 further right. */
  const aside = 10
  const found = fitErrorsInBoth({ model: 'linear', points: x.map((value, i) => ({ x: value + aside, y: y[i]!, sd: 1 / Math.sqrt(weightY[i]!), sdX: 1 / Math.sqrt(weightX[i]!) })) })
  const [level, slope] = estimates(found.fit)

  it('has the published slope and intercept', () => {
    expect(slope).toBeCloseTo(-0.480533407, 8)
    expect(level! + slope! * aside).toBeCloseTo(5.47991022, 7)
  })

  it('has the published sum of squares', () => expect(found.distance).toBeCloseTo(11.8663532, 6))
})
