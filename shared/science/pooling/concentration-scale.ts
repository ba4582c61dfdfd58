/** Shift of the cloud point [K] at a concentration [mol/L]. */
export type ShiftCurve = (x: number) => number

const points = 24
const limits = [Math.log(0.5), Math.log(2)] as const
const golden = (Math.sqrt(5) - 1) / 2
const steps = 40

/**
 * The factor s that lays one lab's curve on another's when all its concentrations are multiplied by it: d(x) ≈ reference(s·x).
 * A stock that holds 85 % of its label shows as s = 0.85.
 *
 * @param reach highest concentration of the curve [mol/L]
 * @returns s between 0.5 and 2
 */
export function concentrationScale(curve: ShiftCurve, reference: ShiftCurve, reach: number): number {
  const xs = Array.from({ length: points }, (_, index) => reach * (index + 1) / points)
  const own = xs.map(curve)
  const misfit = (logarithm: number) => xs.reduce((total, x, index) => total + (own[index]! - reference(x * Math.exp(logarithm))) ** 2, 0)
  return Math.exp(minimum(misfit, lowestOfGrid(misfit)))
}

/** A curve that rises and falls again can have two minima: start the search in the lower one. */
function lowestOfGrid(misfit: (value: number) => number): readonly [number, number] {
  const width = (limits[1] - limits[0]) / points
  const grid = Array.from({ length: points + 1 }, (_, index) => limits[0] + index * width)
  const lowest = grid.reduce((best, value) => misfit(value) < misfit(best) ? value : best)
  return [Math.max(limits[0], lowest - width), Math.min(limits[1], lowest + width)]
}

function minimum(misfit: (value: number) => number, [from, to]: readonly [number, number]): number {
  let [low, high] = [from, to]
  for (let step = 0; step < steps; step++) {
    const left = high - golden * (high - low)
    const right = low + golden * (high - low)
    if (misfit(left) < misfit(right)) high = right
    else low = left
  }
  return (low + high) / 2
}
