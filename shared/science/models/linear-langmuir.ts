import { units } from '../chemistry/units'
import { association, level, saturation, slope, type DerivedValue, type Model } from './model'

/**
 * T0 + c·x + Bmax·K·x/(1 + K·x): binding on top of the straight line.
 * T0 [°C], c [K/M], Bmax [K], K [1/M] > 0, x [M].
 *
 * @source Zhang, Journal of the American Chemical Society 127 (2005) 14505 (the equation; entered from memory)
 */
export const linearLangmuir: Model = {
  name: 'linear-langmuir',
  parameters: [level, slope, saturation, association],
  value(p, x) {
    const kx = p[3]! * x
    return p[0]! + p[1]! * x + p[2]! * kx / (1 + kx)
  },
  gradient(p, x, out, at, stride) {
    const t = 1 / (1 + p[3]! * x)
    out[at] = 1
    out[at + stride] = x
    out[at + 2 * stride] = p[3]! * x * t
    out[at + 3 * stride] = p[2]! * x * t * t
  },
  derived(p) {
    const c = p[1]!
    const bmax = p[2]!
    const k = p[3]!
    return [
      { name: 'Kd', unit: units.Kd, value: 1 / k, gradient: [0, 0, 0, -1 / (k * k)] },
      { name: 'initialSlope', unit: units.initialSlope, value: c + bmax * k, gradient: [0, 1, k, bmax] },
      { name: 'BmaxK', unit: units.BmaxK, value: bmax * k, gradient: [0, 0, k, bmax] },
      ...extremum(c, bmax, k),
    ]
  },
}

/**
 * Where the curve turns and where it comes back to T0. With ρ = √(−Bmax·K/c): x* = (ρ − 1)/K, height
 * ±(√|Bmax| − √(|c|/K))², crossover −Bmax/c − 1/K. They exist for Bmax·c < 0 and ρ > 1.
 */
function extremum(c: number, bmax: number, k: number): DerivedValue[] {
  const rho = Math.sqrt(-bmax * k / c)
  if (!(bmax * c < 0) || !(rho > 1)) return []
  const kind = c < 0 ? 'maximum' : 'minimum'
  const at = (rho - 1) / k
  const half = rho / (2 * k)
  const share = (rho - 1) / rho
  const height = Math.sign(bmax) * (Math.sqrt(Math.abs(bmax)) - Math.sqrt(Math.abs(c) / k)) ** 2
  return [
    { name: `${kind}Concentration`, unit: units[`${kind}Concentration`], value: at, gradient: [0, -half / c, half / bmax, half / k - at / k] },
    // The gradient of the height is ∂f/∂p at x*, because ∂f/∂x is zero there.
    { name: `${kind}Shift`, unit: units[`${kind}Shift`], value: height, gradient: [0, at, share, bmax * at / (rho * rho)] },
    { name: 'crossoverConcentration', unit: units.crossoverConcentration, value: -bmax / c - 1 / k, gradient: [0, bmax / (c * c), -1 / c, 1 / (k * k)] },
  ]
}
