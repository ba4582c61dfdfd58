import { invertTriangle, scaledSingularValues } from '../numeric/qr'
import type { Stationary } from './polish'

/** Beyond this ratio of singular values a covariance would be noise. */
export const smallestSingularValue = 1e-12

export interface Covariance {
  /** (JᵀWJ)⁻¹ by rows; null where the Jacobian is singular. */
  unscaled: number[][] | null
  /** Condition number of the Jacobian with columns of unit length; Infinity where singular. */
  condition: number
  leverages: Float64Array | null
}

/** From R of the QR of the whitened Jacobian, never from JᵀWJ. */
export function covarianceOf(stationary: Stationary, readings: number, size: number): Covariance {
  const { triangle, jacobian } = stationary
  const { largest, smallest } = scaledSingularValues(triangle, readings, size)
  const isSingular = stationary.isSingular || !(smallest > smallestSingularValue * largest)
  if (isSingular) return { unscaled: null, condition: smallest > 0 ? largest / smallest : Infinity, leverages: null }
  const inverse = invertTriangle(triangle, readings, size)
  const unscaled: number[][] = []
  for (let i = 0; i < size; i++) {
    const row = new Array<number>(size)
    for (let j = 0; j < size; j++) {
      let sum = 0
      for (let k = Math.max(i, j); k < size; k++) sum += inverse[k * size + i]! * inverse[k * size + j]!
      row[j] = sum
    }
    unscaled.push(row)
  }
  return { unscaled, condition: largest / smallest, leverages: leveragesOf(jacobian, inverse, readings, size) }
}

/** Diagonal of J·(JᵀJ)⁻¹·Jᵀ: how much each reading pulls its own fitted value. */
function leveragesOf(jacobian: Float64Array, inverse: Float64Array, readings: number, size: number): Float64Array {
  const leverages = new Float64Array(readings)
  for (let i = 0; i < readings; i++) {
    let sum = 0
    for (let k = 0; k < size; k++) {
      let q = 0
      for (let j = 0; j <= k; j++) q += jacobian[j * readings + i]! * inverse[k * size + j]!
      sum += q * q
    }
    leverages[i] = Math.min(sum, 1)
  }
  return leverages
}

export function correlationOf(covariance: number[][]): number[][] {
  return covariance.map((row, i) => row.map((value, j) =>
    i === j ? 1 : Math.max(-1, Math.min(1, value / Math.sqrt(row[i]! * covariance[j]![j]!)))))
}

/** gᵀCg as a standard error. */
export function deltaStandardError(gradient: readonly number[], covariance: readonly (readonly number[])[]): number {
  let variance = 0
  for (let i = 0; i < gradient.length; i++) {
    for (let j = 0; j < gradient.length; j++) variance += gradient[i]! * covariance[i]![j]! * gradient[j]!
  }
  return Math.sqrt(Math.max(variance, 0))
}
