import type { FitNote } from '../types'
import { fewestSamplesForSd } from '../weights'
import { derivedValue, note, parameterOf, type Diagnosis } from './note'
import { thresholds } from './thresholds'

/** Whether the concentrations lie where the constants are decided. */
export const ladder: Diagnosis = ({ analysis, result }) => {
  if (result.model === 'expression') return []
  const xs = analysis.request.points.map(({ x }) => x)
  const highest = Math.max(...xs)
  const lowest = Math.min(...xs.filter(x => x > 0))
  const notes: FitNote[] = []
  const k = parameterOf(result, 'K')
  if (k?.estimate != null && !k.fixed) {
    const reach = k.estimate * highest
    if (reach < 1) notes.push(note('saturation-not-reached', 'caution', { reach, occupancy: 100 * reach / (1 + reach), highest, needed: 1 / k.estimate }))
    if (k.estimate * lowest > 1) notes.push(note('low-concentrations-missing', 'caution', { reach: k.estimate * lowest, lowest, needed: 1 / k.estimate }))
  }
  const t0 = parameterOf(result, 'T0')
  if (t0 && !t0.fixed && !xs.includes(0)) notes.push(note('blank-missing', 'caution', { lowest }))
  return notes
}

/** Quantities that lie beyond the readings. */
export const extrapolation: Diagnosis = ({ analysis, result }) => {
  if (result.model === 'expression') return []
  const highest = Math.max(...analysis.request.points.map(({ x }) => x))
  return ['maximumConcentration', 'minimumConcentration', 'crossoverConcentration'].flatMap((name) => {
    const quantity = derivedValue(result, name)
    return quantity && quantity.estimate > highest ? [note('extrapolated', 'info', { quantity: name, value: quantity.estimate, highest })] : []
  })
}

/** Whether the weights themselves need a word. */
export const weighting: Diagnosis = ({ analysis }) => {
  const { weights, request, free } = analysis
  const notes: FitNote[] = []
  if (weights.floored.length > 0) {
    notes.push(note('resolution-floor', 'info', { count: weights.floored.length, floor: weights.floor, reading: weights.floored[0]! + 1 }))
  }
  if (!weights.values) return notes
  const fewest = Math.min(...request.points.map(({ n }) => n ?? Infinity))
  if (weights.weighting === 'sd' && fewest < fewestSamplesForSd) {
    notes.push(note('weights-from-few-replicates', 'caution', { fewest, needed: fewestSamplesForSd }))
  }
  const sum = weights.values.reduce((total, value) => total + value, 0)
  const effective = sum ** 2 / weights.values.reduce((total, value) => total + value * value, 0)
  if (effective < Math.max(thresholds.effectiveShare * request.points.length, Math.min(free.length, request.points.length - 1))) {
    const heaviest = weights.values.indexOf(Math.max(...weights.values))
    notes.push(note('weights-dominate', 'caution', { effective, n: request.points.length, reading: heaviest + 1, percent: 100 * weights.values[heaviest]! / sum }))
  }
  return notes
}

/** Whether a slip in a concentration would show above the scatter. */
export const concentrations: Diagnosis = ({ analysis, result }) => {
  const { solution } = analysis
  const s = result.residualStandardDeviation
  if (result.model === 'expression' || s === null || s === 0 || analysis.weights.weighting === 'sd') return []
  const { data } = solution.problem
  let largest = 0
  for (const x of data.x) {
    const change = solution.estimated.value(solution.values, x * (1 + thresholds.concentrationError)) - solution.estimated.value(solution.values, x)
    largest = Math.max(largest, Math.abs(change) * data.yScale)
  }
  return largest > s ? [note('concentrations-taken-as-exact', 'info', { percent: 100 * thresholds.concentrationError, effect: largest, s })] : []
}
