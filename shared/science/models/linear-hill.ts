import { units } from '../chemistry/units'
import { association, level, saturation, slope, type Model, type ParameterDefinition } from './model'

const cooperativity: ParameterDefinition = { name: 'h', unit: units.h, yPower: 0, xPower: 0, isShape: true }

/**
 * T0 + c·x + Bmax·(K·x)^h/(1 + (K·x)^h): binding with cooperativity h [1].
 *
 * @source Hill, Journal of Physiology 40 (1910) iv (the isotherm)
 */
export const linearHill: Model = {
  name: 'linear-hill',
  parameters: [level, slope, saturation, association, cooperativity],
  value(p, x) {
    return p[0]! + p[1]! * x + p[2]! * occupancy(p[3]! * x, p[4]!)
  },
  gradient(p, x, out, at, stride) {
    const theta = occupancy(p[3]! * x, p[4]!)
    const spread = theta * (1 - theta)
    out[at] = 1
    out[at + stride] = x
    out[at + 2 * stride] = theta
    out[at + 3 * stride] = p[2]! * spread * p[4]! / p[3]!
    out[at + 4 * stride] = spread === 0 ? 0 : p[2]! * spread * Math.log(p[3]! * x)
  },
  derived: p => [
    { name: 'Kd', unit: units.Kd, value: 1 / p[3]!, gradient: [0, 0, 0, -1 / (p[3]! * p[3]!), 0] },
  ],
}

function occupancy(kx: number, h: number): number {
  return kx <= 0 ? 0 : 1 / (1 + kx ** -h)
}
