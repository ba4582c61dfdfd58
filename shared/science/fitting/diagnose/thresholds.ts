/**
 * Where a note begins. Set so that at most one clean series in ten shows any caution; the simulation that checks it is
 * tests/unit/fitting/diagnose/false-cautions.test.ts, its table stands in docs/numerics.md.
 */
export const thresholds = {
  /** Condition number of the Jacobian with columns of unit length. */
  condition: 300,
  /** Upper end of an interval over its lower end. */
  intervalFactor: 3,
  /** Relative standard error below which the product Bmax·K counts as known. */
  productError: 0.15,
  /** Degrees of freedom below which points are few. */
  degreesOfFreedom: 3,
  /** Probability of the residual checks. */
  residualProbability: 0.01,
  /** Fewest values for a test of normality. */
  normalityValues: 8,
  /** Fewest degrees of freedom of replicates for a test against them. */
  replicateFreedom: 2,
  /** Sum of the weights squared over the sum of their squares, per reading: below it few readings carry the fit. */
  effectiveShare: 1 / 3,
  /** Probability, by simulation on the same design, of a removal that moves a constant as far. */
  influenceProbability: 0.01,
  /** Relative error of a concentration whose effect is compared with the scatter. */
  concentrationError: 0.01,
} as const
