/**
 * What is left of a binding model when the best K runs to zero or to infinity: linear models whose coefficients are the
 * quantities that stay determined.
 */
import { units } from '../chemistry/units'
import { level, saturation, slope, type Model, type ParameterDefinition } from './model'
import { linear } from './linear'
import { linearQuadratic } from './linear-quadratic'

const initialSlope: ParameterDefinition = { name: 'initialSlope', unit: units.initialSlope, yPower: 1, xPower: -1 }
const curvature: ParameterDefinition = { name: 'curvature', unit: units.curvature, yPower: 1, xPower: -2 }
const approach: ParameterDefinition = { name: 'BmaxOverK', unit: units.BmaxOverK, yPower: 1, xPower: 1 }
const plateau: ParameterDefinition = { name: 'plateau', unit: units.plateau, yPower: 1, xPower: 0, isLevel: true }

/** K → 0 with a free slope: T0, c + Bmax·K and −Bmax·K². */
export const weakBinding: Model = { ...linearQuadratic, parameters: [level, initialSlope, curvature], derived: () => [] }

/** K → 0 without one: T0 and the initial slope. */
export const weakBindingLine: Model = { ...linear, parameters: [level, initialSlope] }

/** K → ∞ with blanks: T0, c and the step Bmax between the blanks and the rest. */
export const strongBinding: Model = {
  name: 'linear-langmuir',
  parameters: [level, slope, saturation],
  value: (p, x) => p[0]! + p[1]! * x + (x > 0 ? p[2]! : 0),
  gradient(_, x, out, at, stride) {
    out[at] = 1
    out[at + stride] = x
    out[at + 2 * stride] = x > 0 ? 1 : 0
  },
  derived: () => [],
}

/** K → ∞ without blanks: T0 + Bmax, c and Bmax/K, with which the curve falls off the plateau as 1/x. */
export const strongBindingPlateau: Model = {
  name: 'linear-langmuir',
  parameters: [plateau, slope, approach],
  value: (p, x) => p[0]! + p[1]! * x - p[2]! / x,
  gradient(_, x, out, at, stride) {
    out[at] = 1
    out[at + stride] = x
    out[at + 2 * stride] = -1 / x
  },
  derived: () => [],
}
