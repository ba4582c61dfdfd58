import type { RailEntry } from '~~/components/chart/rail/layout'

const normal95 = 1.96

/**
 * Shift of the cloud point at 0.30 M of a sodium salt, in kelvin, and the half-width of its 95 % interval for another
 * lab. Invented, of the size that the demonstration project has.
 */
const shifts: readonly (readonly [ion: string, shift: number, halfWidth: number])[] = [
  ['CO3^2-', -11.44, 0.73],
  ['SO4^2-', -9.05, 0.59],
  ['H2PO4^-', -6.34, 0.45],
  ['F^-', -6.32, 0.45],
  ['Cl^-', -3.57, 0.32],
  ['Br^-', -2.38, 0.27],
  ['NO3^-', -1.07, 0.25],
  ['I^-', -0.27, 0.24],
  ['ClO4^-', -0.24, 0.25],
  ['SCN^-', 1.03, 0.25],
]

export const demonstrationRail: readonly RailEntry[] = shifts.map(([ion, value, halfWidth]) => ({
  ion, value, lower: value - halfWidth, upper: value + halfWidth, standardError: halfWidth / normal95,
}))
