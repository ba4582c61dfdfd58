/** Tails and quantiles of the distributions a fit needs. */

const lanczos = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
]

/** ln Γ(z) for z > 0. @source Lanczos, Journal of SIAM: Numerical Analysis B 1 (1964) 86 */
export function logGamma(z: number): number {
  if (z < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * z)) - logGamma(1 - z)
  const shifted = z - 1
  let series = lanczos[0]!
  for (let i = 1; i < lanczos.length; i++) series += lanczos[i]! / (shifted + i)
  const t = shifted + 7.5
  return 0.5 * Math.log(2 * Math.PI) + (shifted + 0.5) * Math.log(t) - t + Math.log(series)
}

const tiny = 1e-300

/** Regularized incomplete beta function I_x(a, b). @source Lentz, Applied Optics 15 (1976) 668 (continued fraction) */
export function incompleteBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0
  if (x >= 1) return 1
  if (x > (a + 1) / (a + b + 2)) return 1 - incompleteBeta(1 - x, b, a)
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x)) / a
  let c = 1
  let d = 1 / nonZero(1 - (a + b) * x / (a + 1))
  let fraction = d
  for (let m = 1; m < 500; m++) {
    const even = m * (b - m) * x / ((a + 2 * m - 1) * (a + 2 * m))
    d = 1 / nonZero(1 + even * d)
    c = nonZero(1 + even / c)
    fraction *= d * c
    const odd = -(a + m) * (a + b + m) * x / ((a + 2 * m) * (a + 2 * m + 1))
    d = 1 / nonZero(1 + odd * d)
    c = nonZero(1 + odd / c)
    fraction *= d * c
    if (Math.abs(d * c - 1) < 1e-15) break
  }
  return front * fraction
}

function nonZero(value: number): number {
  return Math.abs(value) < tiny ? tiny : value
}

/** Upper tail Q(a, x) of the regularized incomplete gamma function. */
export function upperGamma(a: number, x: number): number {
  if (x <= 0) return 1
  const front = Math.exp(-x + a * Math.log(x) - logGamma(a))
  if (x < a + 1) {
    let term = 1 / a
    let sum = term
    for (let k = 1; k < 1000 && term > sum * 1e-16; k++) {
      term *= x / (a + k)
      sum += term
    }
    return 1 - front * sum
  }
  let b = x + 1 - a
  let c = 1 / tiny
  let d = 1 / b
  let fraction = d
  for (let i = 1; i < 1000; i++) {
    const an = -i * (i - a)
    b += 2
    d = 1 / nonZero(an * d + b)
    c = nonZero(b + an / c)
    fraction *= d * c
    if (Math.abs(d * c - 1) < 1e-15) break
  }
  return front * fraction
}

/** P(F > f) with d1 and d2 degrees of freedom. */
export function upperTailOfF(f: number, d1: number, d2: number): number {
  return f <= 0 ? 1 : incompleteBeta(d2 / (d2 + d1 * f), d2 / 2, d1 / 2)
}

/** P(χ² > value). */
export function upperTailOfChiSquare(value: number, degreesOfFreedom: number): number {
  return upperGamma(degreesOfFreedom / 2, value / 2)
}

/** P(Z ≤ z) for the standard normal distribution. */
export function normalDistribution(z: number): number {
  const tail = upperGamma(0.5, z * z / 2) / 2
  return z > 0 ? 1 - tail : tail
}

/** z with P(Z ≤ z) = p. */
export function normalQuantile(p: number): number {
  if (p > 0.5) return -normalQuantile(1 - p)
  if (p <= 0) return -Infinity
  const t = Math.sqrt(-2 * Math.log(p))
  let z = -(t - (2.30753 + 0.27061 * t) / (1 + t * (0.99229 + 0.04481 * t)))
  for (let i = 0; i < 4; i++) z -= (normalDistribution(z) - p) / (Math.exp(-z * z / 2) / Math.sqrt(2 * Math.PI))
  return z
}

const knownStudentQuantiles = new Map<string, number>()

/** t with P(T ≤ t) = p; remembered, because every fit of a batch asks for the same one. */
export function studentQuantile(p: number, degreesOfFreedom: number): number {
  const key = `${p},${degreesOfFreedom}`
  const known = knownStudentQuantiles.get(key)
  if (known !== undefined) return known
  if (knownStudentQuantiles.size > 5_000) knownStudentQuantiles.clear()
  const value = solveStudentQuantile(p, degreesOfFreedom)
  knownStudentQuantiles.set(key, value)
  return value
}

function solveStudentQuantile(p: number, v: number): number {
  if (p < 0.5) return -solveStudentQuantile(1 - p, v)
  if (p === 0.5) return 0
  const upperTail = (t: number) => incompleteBeta(v / (v + t * t), v / 2, 0.5) / 2
  let low = 0
  let high = Math.max(1, normalQuantile(p))
  while (upperTail(high) > 1 - p) high *= 2
  const density = Math.exp(logGamma((v + 1) / 2) - logGamma(v / 2)) / Math.sqrt(v * Math.PI)
  let t = (low + high) / 2
  for (let i = 0; i < 100; i++) {
    const excess = upperTail(t) - (1 - p)
    if (excess > 0) low = t
    else high = t
    const newton = t + excess / (density * (1 + t * t / v) ** (-(v + 1) / 2))
    const next = newton > low && newton < high ? newton : (low + high) / 2
    if (Math.abs(next - t) <= 1e-14 * t) return next
    t = next
  }
  return t
}
