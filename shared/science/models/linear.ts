import { level, slope, type Model } from './model'

/** T0 + c·x: the straight line of strongly hydrated anions. */
export const linear: Model = {
  name: 'linear',
  parameters: [level, slope],
  value: (p, x) => p[0]! + p[1]! * x,
  gradient(_, x, out, at, stride) {
    out[at] = 1
    out[at + stride] = x
  },
  derived: () => [],
}
