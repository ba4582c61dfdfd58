/**
 * Numbers that look random and repeat from a seed: xoshiro128**, seeded through splitmix32.
 *
 * @source D. Blackman, S. Vigna, ACM Trans. Math. Softw. 47 (2021) 36
 */

export type XoshiroState = readonly [number, number, number, number]

export interface Random {
  /** even in [0, 1) */
  uniform: () => number
  /** standard normal */
  normal: () => number
}

const rotate = (value: number, by: number) => (value << by) | (value >>> (32 - by))

/** The bare generator: whole numbers from 0 to 2³² − 1. The state must not be all zero. */
export function xoshiro128(state: XoshiroState): () => number {
  let [a, b, c, d] = state
  return () => {
    const result = Math.imul(rotate(Math.imul(b, 5), 7), 9) >>> 0
    const shifted = b << 9
    c ^= a
    d ^= b
    b ^= c
    a ^= d
    c ^= shifted
    d = rotate(d, 11)
    return result
  }
}

/** Spreads a 32-bit seed over the state, so that near seeds give unrelated sequences. */
function stateFrom(seed: number): XoshiroState {
  let state = seed >>> 0
  const next = () => {
    state = (state + 0x9E3779B9) | 0
    let mixed = state ^ (state >>> 16)
    mixed = Math.imul(mixed, 0x21F0AAAD)
    mixed ^= mixed >>> 15
    mixed = Math.imul(mixed, 0x735A2D97)
    return mixed ^ (mixed >>> 15)
  }
  return [next(), next(), next(), next()]
}

/** @param seed whole number; its lowest 32 bits count */
export function seededRandom(seed: number): Random {
  const next = xoshiro128(stateFrom(seed))
  const uniform = () => next() / 2 ** 32
  // Box–Muller; 1 − u keeps the logarithm away from zero.
  const normal = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform())
  return { uniform, normal }
}
