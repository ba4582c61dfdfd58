/**
 * Root of a continuous function between two points where its signs differ: the method of Brent, as false position with
 * bisection to fall back on.
 *
 * @param f continuous on [a, b]; fa = f(a) and fb = f(b) have opposite signs, or one is zero
 * @param tolerance absolute, on the argument
 * @returns an argument within `tolerance` of a sign change
 * @source Brent, Computer Journal 14 (1971) 422
 */
export function findRoot(f: (at: number) => number, a: number, b: number, fa: number, fb: number, tolerance: number): number {
  if (fa === 0) return a
  if (fb === 0) return b
  let c = a
  let fc = fa
  let step = b - a
  let previous = step
  for (let iteration = 0; iteration < 100; iteration++) {
    if ((fb > 0) === (fc > 0)) {
      c = a
      fc = fa
      step = previous = b - a
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b
      b = c
      c = a
      fa = fb
      fb = fc
      fc = fa
    }
    const smallest = 2 * Number.EPSILON * Math.abs(b) + tolerance / 2
    const half = (c - b) / 2
    if (Math.abs(half) <= smallest || fb === 0) return b
    if (Math.abs(previous) >= smallest && Math.abs(fa) > Math.abs(fb)) {
      const proposal = interpolate(a, b, c, fa, fb, fc)
      const limit = Math.min(3 * Math.abs(half) - smallest, Math.abs(previous))
      const isUseful = proposal * half > 0 && 2 * Math.abs(proposal) < limit
      previous = isUseful ? step : half
      step = isUseful ? proposal : half
    }
    else {
      step = previous = half
    }
    a = b
    fa = fb
    b += Math.abs(step) > smallest ? step : (half > 0 ? smallest : -smallest)
    fb = f(b)
  }
  return b
}

/** Step from b by inverse quadratic interpolation, or by the secant where only two points differ. */
function interpolate(a: number, b: number, c: number, fa: number, fb: number, fc: number): number {
  const s = fb / fa
  if (a === c) return s * (c - b) / (s - 1)
  const q = fa / fc
  const r = fb / fc
  const numerator = s * ((c - b) * q * (q - r) - (b - a) * (r - 1))
  return -numerator / ((q - 1) * (r - 1) * (s - 1))
}

const goldenSection = (3 - Math.sqrt(5)) / 2

/**
 * Largest value of a unimodal function on [a, b], by golden section with parabolic steps.
 *
 * @param tolerance absolute, on the argument
 * @source Brent, Algorithms for Minimization without Derivatives (1973), chapter 5
 */
export function maximize(f: (at: number) => number, a: number, b: number, tolerance: number): { at: number, value: number } {
  let x = a + goldenSection * (b - a)
  let w = x
  let v = x
  let fx = f(x)
  let fw = fx
  let fv = fx
  let step = 0
  let previous = 0
  for (let iteration = 0; iteration < 100; iteration++) {
    const middle = (a + b) / 2
    if (Math.abs(x - middle) <= 2 * tolerance - (b - a) / 2) break
    const parabola = parabolicStep(x, w, v, fx, fw, fv)
    if (Math.abs(parabola) < Math.abs(previous) / 2 && x + parabola > a && x + parabola < b) {
      previous = step
      step = parabola
    }
    else {
      previous = x < middle ? b - x : a - x
      step = goldenSection * previous
    }
    const u = x + (Math.abs(step) >= tolerance ? step : step > 0 ? tolerance : -tolerance)
    const fu = f(u)
    if (fu >= fx) {
      if (u < x) b = x
      else a = x
      ;[v, w, x] = [w, x, u]
      ;[fv, fw, fx] = [fw, fx, fu]
      continue
    }
    if (u < x) a = u
    else b = u
    if (fu >= fw || w === x) {
      ;[v, w] = [w, u]
      ;[fv, fw] = [fw, fu]
    }
    else if (fu >= fv || v === x || v === w) {
      v = u
      fv = fu
    }
  }
  return { at: x, value: fx }
}

function parabolicStep(x: number, w: number, v: number, fx: number, fw: number, fv: number): number {
  const r = (x - w) * (fx - fv)
  const q = (x - v) * (fx - fw)
  const numerator = (x - v) * q - (x - w) * r
  const denominator = 2 * (q - r)
  return denominator === 0 ? Infinity : -numerator / denominator
}
