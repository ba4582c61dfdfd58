/** What a fit says about a concentration, a wanted shift and the energy that K stands for, in words. */
import { apparentEnergy } from '#shared/science/derived/energy'
import { concentrationsFor, shiftAt } from '#shared/science/derived/shifts'
import type { FitResult } from '#shared/science/fitting/types'
import { concise } from '#shared/science/notation'
import { listed } from '~~/components/project/overview/words'

/** Beyond this many times the largest concentration measured nothing is said. */
const furthest = 3

const reachOf = ({ residuals }: FitResult) => Math.max(...residuals.map(({ x }) => x))
const isBeyond = (x: number, fit: FitResult) => x > reachOf(fit)
const beyondWords = ' (beyond the readings)'

/** Shift at a concentration [mol/L]: '+1.03(2) K'. */
export function shiftWords(fit: FitResult, x: number): string {
  const shift = shiftAt(fit, x)
  if (!shift) return 'open: the fit leaves a constant open'
  return `${shift.estimate > 0 ? '+' : ''}${concise(shift.estimate, shift.standardError)} K${isBeyond(x, fit) ? beyondWords : ''}`
}

/** Concentrations for a shift [K]: '0.0821(24) M and 0.52(3) M'. */
export function concentrationWords(fit: FitResult, by: number): string {
  const roots = concentrationsFor(fit, by, furthest * reachOf(fit))
  if (roots.length === 0) return `not reached up to ${concise(furthest * reachOf(fit), null)} M`
  return listed(roots.map(({ estimate, standardError }) => `${concise(estimate, standardError)} M${isBeyond(estimate, fit) ? beyondWords : ''}`))
}

/** Apparent ΔG at T0; null without a finite K. */
export function energyWords(fit: FitResult): string | null {
  const level = fit.parameters.find(({ name }) => name === 'T0')?.estimate
  const energy = level === null || level === undefined ? null : apparentEnergy(fit, level)
  return energy && `${concise(energy.estimate, energy.standardError)} kJ mol^−1^`
}
