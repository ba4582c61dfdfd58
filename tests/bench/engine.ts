/** Times the engine on the problems of the bench and prints JSON; run by scripts/bench.mjs. Asserts nothing. */
import { bindingInterval } from '#shared/science/fitting/conditional-intervals'
import { covarianceOf } from '#shared/science/fitting/covariance'
import { fitExpression } from '#shared/science/fitting/expression'
import { fit, type FitRequest } from '#shared/science/fitting'
import { problemOf } from '#shared/science/fitting/named'
import { scaleData } from '#shared/science/fitting/scale'
import { solve } from '#shared/science/fitting/solve'
import { models } from '#shared/science/models'
import { studentQuantile } from '#shared/science/numeric/distributions'
import { seededRandom } from '#shared/science/random'
import { readFileSync } from 'node:fs'

interface Series { x: number[], y: number[] }

const { x, y } = JSON.parse(readFileSync(process.argv[2]!, 'utf8')) as Series
const points = x.map((value, i) => ({ x: value, y: y[i]! }))
const resamples = 2_000
const rounds = 15

/** Median over rounds of the microseconds one call takes, after as many calls to warm up. */
function microseconds(calls: number, work: () => unknown): number {
  for (let i = 0; i < calls; i++) work()
  const times = Array.from({ length: rounds }, () => {
    const start = performance.now()
    for (let i = 0; i < calls; i++) work()
    return 1_000 * (performance.now() - start) / calls
  })
  return times.sort((a, b) => a - b)[Math.floor(rounds / 2)]!
}

function solveWithCovariance(values: ArrayLike<number>) {
  const solution = solve(problemOf(models['linear-langmuir'], scaleData(x, values, null), {}))
  return { solution, covariance: covarianceOf(solution.stationary!, x.length, solution.columns.length) }
}

const { solution } = solveWithCovariance(y)
const fitted = fit({ model: 'linear-langmuir', points }).residuals
const random = seededRandom(1)
const resampled = Array.from({ length: resamples }, () => fitted.map(reading => reading.fitted + fitted[Math.floor(random.uniform() * fitted.length)]!.residual))
const delta = solution.sum / (x.length - 4) * studentQuantile(0.975, x.length - 4) ** 2
const typed: FitRequest = {
  model: { expression: 'T0 + c*x + Bmax*K*x/(1+K*x)', variable: 'x', parameters: { T0: { start: 30 }, c: { start: -1 }, Bmax: { start: 1 }, K: { start: 1 } } },
  points,
  intervals: 't',
}

console.log(JSON.stringify({
  core: microseconds(2_000, () => solveWithCovariance(y)),
  whole: microseconds(300, () => fit({ model: 'linear-langmuir', points })),
  expression: microseconds(100, () => fitExpression(typed)),
  bootstrap: microseconds(1, () => resampled.map(values => solveWithCovariance(values))) / 1_000,
  interval: microseconds(2_000, () => bindingInterval(solution, delta)),
  estimates: fit({ model: 'linear-langmuir', points }).parameters.map(({ estimate }) => estimate),
}))
