/** The binding constant as an energy: a way of writing K, not a measured one. */
import { solved, type Quantity, type SolvedFit } from './gradients'

/** J/(mol K), exact. @source CODATA 2018 */
const gasConstant = 8.314462618
const kelvinAtZero = 273.15

/**
 * Apparent ΔG = −R·T·ln(K·1 M) [kJ/mol], on the 1 M standard state. K is an apparent constant: so is this.
 *
 * @param temperature [°C], usually T0
 * @returns null where the fit has no finite K
 */
export function apparentEnergy(fit: SolvedFit, temperature: number): Quantity | null {
  const found = solved(fit)
  const j = fit.parameters.findIndex(({ name }) => name === 'K')
  if (!found || j < 0 || !(found.values[j]! > 0)) return null
  const size = gasConstant * (temperature + kelvinAtZero) / 1000
  const gradient = found.values.map((value, i) => i === j ? -size / value : 0)
  return found.quantity(-size * Math.log(found.values[j]!), gradient)
}
