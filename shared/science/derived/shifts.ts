/** How far a salt moves the cloud point, and how much of it a wanted move takes. */
import { findRoot } from '../numeric/roots'
import { gradientAt, solved, type Quantity, type Solved, type SolvedFit } from './gradients'

/**
 * Shift of the cloud point at a concentration, f(x) − T0 [K].
 *
 * @param x concentration [mol/L], 0 or more
 * @returns null where the fit leaves a constant open
 */
export function shiftAt(fit: SolvedFit, x: number): Quantity | null {
  const found = solved(fit)
  return found && found.quantity(shift(found, x), shiftGradient(found, x))
}

/**
 * Concentrations at which the cloud point has moved by `by` [K], lowest first: none, one or two [mol/L].
 *
 * For the line with binding both roots of c·K·x² + (c + Bmax·K − d·K)·x − d = 0, without cancellation; for other models
 * roots are bracketed up to `reach`. Standard errors by the delta method: ∂x/∂p = −(∂d/∂p)/d′(x).
 *
 * @param reach largest concentration that is looked at [mol/L]
 */
export function concentrationsFor(fit: SolvedFit, by: number, reach: number): Quantity[] {
  const found = solved(fit)
  if (!found || !Number.isFinite(by)) return []
  const roots = found.model.name === 'linear-langmuir' ? bindingRoots(found.values, by) : bracketedRoots(found, by, reach)
  return roots.filter(x => x >= 0 && x <= reach).sort((a, b) => a - b).map((x) => {
    const slope = slopeAt(found, x)
    return found.quantity(x, shiftGradient(found, x).map(value => slope === 0 ? NaN : -value / slope))
  }).map(({ estimate, standardError }) => ({ estimate, standardError: Number.isFinite(standardError) ? standardError : null }))
}

function shift({ model, values }: Solved, x: number): number {
  return model.value(values, x) - model.value(values, 0)
}

function shiftGradient(found: Solved, x: number): Float64Array {
  const atZero = gradientAt(found, 0)
  return gradientAt(found, x).map((value, j) => value - atZero[j]!)
}

/** d′(x) by central differences on the model's own formula. */
function slopeAt(found: Solved, x: number): number {
  const h = 1e-6 * Math.max(x, 1e-3)
  return x < h ? (shift(found, x + h) - shift(found, x)) / h : (shift(found, x + h) - shift(found, x - h)) / (2 * h)
}

/** Both roots of the quadratic; the one that cancels is had from the product of both. */
function bindingRoots([, c = 0, bmax = 0, k = 0]: readonly number[], by: number): number[] {
  const [a, b] = [c * k, c + bmax * k - by * k]
  if (a === 0) return b === 0 ? [] : [by / b]
  const discriminant = b * b + 4 * a * by
  if (discriminant < 0) return []
  const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant)) / 2
  const roots = q === 0 ? [0] : [q / a, -by / q]
  return discriminant === 0 ? roots.slice(0, 1) : roots
}

const places = 400
const rootTolerance = 1e-13

function bracketedRoots(found: Solved, by: number, reach: number): number[] {
  const away = (x: number) => shift(found, x) - by
  const roots: number[] = by === 0 ? [0] : []
  let [before, beforeAway] = [0, away(0)]
  for (let place = 1; place <= places; place++) {
    const x = reach * place / places
    const here = away(x)
    if (beforeAway !== 0 && Math.sign(beforeAway) !== Math.sign(here)) roots.push(findRoot(away, before, x, beforeAway, here, rootTolerance))
    ;[before, beforeAway] = [x, here]
  }
  return roots
}
