import { units } from '../chemistry/units'
import { association, level, saturation, type Model } from './model'

/**
 * T0 + Bmax·K·x/(1 + K·x): binding alone.
 *
 * @source Langmuir, Journal of the American Chemical Society 40 (1918) 1361 (the isotherm)
 */
export const langmuir: Model = {
  name: 'langmuir',
  parameters: [level, saturation, association],
  value(p, x) {
    const kx = p[2]! * x
    return p[0]! + p[1]! * kx / (1 + kx)
  },
  gradient(p, x, out, at, stride) {
    const t = 1 / (1 + p[2]! * x)
    out[at] = 1
    out[at + stride] = p[2]! * x * t
    out[at + 2 * stride] = p[1]! * x * t * t
  },
  derived(p) {
    const bmax = p[1]!
    const k = p[2]!
    return [
      { name: 'Kd', unit: units.Kd, value: 1 / k, gradient: [0, 0, -1 / (k * k)] },
      { name: 'BmaxK', unit: units.BmaxK, value: bmax * k, gradient: [0, k, bmax] },
    ]
  },
}
