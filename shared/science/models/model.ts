import { units } from '../chemistry/units'
import type { ModelName } from '../fitting/types'

/** One parameter of a model and how it follows a change of axes x → x/xScale, y → (y − yOffset)/yScale. */
export interface ParameterDefinition {
  name: string
  unit: string
  /** Power of the y scale and of the x scale in the parameter's dimension. */
  yPower: 0 | 1
  xPower: 1 | 0 | -1 | -2
  /** Moves with the origin of y. */
  isLevel?: true
  /** The model is not linear in it. */
  isShape?: true
}

/** A quantity computed from the constants, with its gradient by every parameter of the model. */
export interface DerivedValue {
  name: string
  unit: string
  value: number
  gradient: number[]
}

/** y as a function of x with named parameters; the same function holds on scaled axes. */
export interface Model {
  name: ModelName | 'expression'
  parameters: readonly ParameterDefinition[]
  /** @returns y at x; both on the axes of the parameters */
  value(parameters: ArrayLike<number>, x: number): number
  /** Writes ∂y/∂parameter, in the order of `parameters`, to out[at], out[at + stride], … */
  gradient(parameters: ArrayLike<number>, x: number, out: Float64Array, at: number, stride: number): void
  derived(parameters: ArrayLike<number>): DerivedValue[]
}

export const level: ParameterDefinition = { name: 'T0', unit: units.T0, yPower: 1, xPower: 0, isLevel: true }
export const slope: ParameterDefinition = { name: 'c', unit: units.c, yPower: 1, xPower: -1 }
export const saturation: ParameterDefinition = { name: 'Bmax', unit: units.Bmax, yPower: 1, xPower: 0 }
export const association: ParameterDefinition = { name: 'K', unit: units.K, yPower: 0, xPower: -1, isShape: true }
