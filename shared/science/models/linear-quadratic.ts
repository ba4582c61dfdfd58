import { units } from '../chemistry/units'
import { level, slope, type Model, type ParameterDefinition } from './model'

const curvature: ParameterDefinition = { name: 'q', unit: units.q, yPower: 1, xPower: -2 }

/** T0 + c·x + q·x²: a curved line without a binding term; also the limit of weak binding. */
export const linearQuadratic: Model = {
  name: 'linear-quadratic',
  parameters: [level, slope, curvature],
  value: (p, x) => p[0]! + x * (p[1]! + p[2]! * x),
  gradient(_, x, out, at, stride) {
    out[at] = 1
    out[at + stride] = x
    out[at + 2 * stride] = x * x
  },
  derived(p) {
    const c = p[1]!
    const q = p[2]!
    if (!(c > 0 && q < 0)) return []
    return [
      { name: 'maximumConcentration', unit: units.maximumConcentration, value: -c / (2 * q), gradient: [0, -1 / (2 * q), c / (2 * q * q)] },
      { name: 'maximumShift', unit: units.maximumShift, value: -c * c / (4 * q), gradient: [0, -c / (2 * q), c * c / (4 * q * q)] },
      { name: 'crossoverConcentration', unit: units.crossoverConcentration, value: -c / q, gradient: [0, -1 / q, c / (q * q)] },
    ]
  },
}
