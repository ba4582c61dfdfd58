/** Several series fitted at once. */
import { parameterUnits, toOriginal, toScaled } from '../fitting/scale'
import { indexOf } from '../fitting/solve'
import type { FittedParameter } from '../fitting/types'
import { normalQuantile, studentQuantile } from '../numeric/distributions'
import { assemble, solveBlock, type Assembly, type Block } from './blocks'
import { checkShared } from './check'
import { jointCovariance } from './covariance'
import { descendShared, type SharedOptimum } from './descend'
import type { SharedRequest, SharedResult, SharedSeriesResult } from './types'

const usualLevel = 0.95

/**
 * Fits all series with the constants they share. One residual variance for all; intervals by t (or the normal
 * distribution with absolute uncertainties).
 *
 * @returns each series' constants, the shared ones once more by themselves, and the joint covariance
 * @throws ScienceError 'unusable-input' with every problem, contradictory ties among them
 */
export function fitShared(request: SharedRequest): SharedResult {
  checkShared(request)
  const assembly = assemble(request)
  const optimum = descendShared(assembly, startOf(assembly, request))
  return resultOf(request, assembly, optimum)
}

/** Where the series stand by themselves; their own readings may not be enough, then where the blanks or the middle lie. */
function startOf({ blocks, blanks, ties }: Assembly, request: SharedRequest): Float64Array {
  const alone = blocks.map(block => isSolvable(block) ? solveBlock({ ...block, tied: [] }, new Float64Array(0)) : null)
  return Float64Array.from({ length: ties }, (_, t) => {
    const levels = blanks.filter(({ tie }) => tie === t).flatMap(({ data }) => [...data.y])
    const found = blocks.flatMap(({ tied, problem }, b) => tied.filter(([, tie]) => tie === t).flatMap(([parameter]) => {
      const solution = alone[b]
      const place = solution ? indexOf(solution.estimated, problem.model.parameters[parameter]!.name) : -1
      const value = place >= 0 ? solution!.values[place]! : NaN
      return Number.isFinite(value) ? [value] : []
    }))
    const all = levels.length > 0 ? levels : found
    const [block] = blocks.filter(({ tied }) => tied.some(([, tie]) => tie === t))
    const usual = block ? toScaled(block.problem.model, block.problem.data, indexOf(block.problem.model, request.ties[t]!.parameter), 1) : 0
    return all.length > 0 ? all.reduce((sum, value) => sum + value, 0) / all.length : usual
  })
}

function isSolvable({ problem: { data, held } }: Block): boolean {
  const free = held.reduce((count, value) => count + Number(Number.isNaN(value)), 0)
  return new Set(data.x).size >= free
}

function resultOf(request: SharedRequest, assembly: Assembly, optimum: SharedOptimum): SharedResult {
  const { blocks, blanks, data, weights, ties } = assembly
  const n = blocks.reduce((sum, { problem }) => sum + problem.data.n, 0) + blanks.reduce((sum, blank) => sum + blank.data.n, 0)
  const free = ties + blocks.reduce((sum, block) => sum + freeOf(block), 0)
  const degreesOfFreedom = n - free
  const isAbsolute = weights.sdMeaning === 'absolute'
  const variance = degreesOfFreedom <= 0 ? null : isAbsolute ? 1 / data.sumScale : optimum.sum / degreesOfFreedom
  const columns = columnsOf(request, assembly, optimum)
  const unscaled = variance === null ? null : jointCovariance(optimum)
  const units = unitsOf(assembly, optimum)
  const covariance = unscaled?.map((row, i) => row.map((value, j) => variance! * value * units[i]! * units[j]!)) ?? null
  const quantile = degreesOfFreedom <= 0 ? NaN : isAbsolute ? normalQuantile(levelOf(request)) : studentQuantile(levelOf(request), degreesOfFreedom)
  const printed = (column: number, name: string, unit: string, estimate: number): FittedParameter => {
    const standardError = covariance ? Math.sqrt(covariance[column]![column]!) : null
    return {
      name, unit, estimate, standardError, fixed: false,
      interval: standardError === null ? null : { level: request.confidence ?? usualLevel, method: 't', lower: estimate - quantile * standardError, upper: estimate + quantile * standardError },
    }
  }
  const tied = request.ties.map(({ parameter, series }, t) => {
    const { problem, at } = tieAt(assembly, t)
    return { ...printed(t, parameter, problem.model.parameters[at]!.unit, toOriginal(problem.model, problem.data, at, optimum.shared[t]!)), series: [...series] }
  })
  return {
    series: seriesOf(request, assembly, optimum, { printed, tied, columns }), tied, n, degreesOfFreedom, converged: optimum.converged, steps: optimum.steps,
    weighting: weights.weighting, sdMeaning: weights.sdMeaning, residualSumOfSquares: optimum.sum * data.sumScale,
    residualStandardDeviation: degreesOfFreedom > 0 ? Math.sqrt(optimum.sum * data.sumScale / degreesOfFreedom) : null, covariance, columns,
  }
}

const levelOf = ({ confidence = usualLevel }: SharedRequest) => (1 + confidence) / 2

function freeOf({ problem, tied }: Block): number {
  return problem.held.reduce((count, value) => count + Number(Number.isNaN(value)), 0) - tied.length
}

function tieAt({ blocks }: Assembly, tie: number): { problem: Block['problem'], at: number } {
  const block = blocks.find(({ tied }) => tied.some(([, of]) => of === tie))!
  return { problem: block.problem, at: block.tied.find(([, of]) => of === tie)![0] }
}

function columnsOf({ series, ties }: SharedRequest, { blocks }: Assembly, { solutions }: SharedOptimum): SharedResult['columns'] {
  return [
    ...ties.map((_, tie) => ({ tie })),
    ...blocks.flatMap((_, b) => (solutions[b]!.stationary ? solutions[b]!.columns : []).map(j => ({ series: series[b]!.id, parameter: solutions[b]!.estimated.parameters[j]!.name }))),
  ]
}

/** Size of one scaled unit of each column on the original axes. */
function unitsOf(assembly: Assembly, { solutions }: SharedOptimum): number[] {
  const ofTies = Array.from({ length: assembly.ties }, (_, t) => {
    const { problem, at } = tieAt(assembly, t)
    return parameterUnits(problem.model, problem.data)[at]!
  })
  return [...ofTies, ...assembly.blocks.flatMap(({ problem }, b) => {
    const { estimated, columns, stationary } = solutions[b]!
    const units = parameterUnits(estimated, problem.data)
    return (stationary ? columns : []).map(j => units[j]!)
  })]
}

interface Printing {
  printed: (column: number, name: string, unit: string, estimate: number) => FittedParameter
  tied: SharedResult['tied']
  columns: SharedResult['columns']
}

function seriesOf({ series }: SharedRequest, { blocks }: Assembly, { solutions }: SharedOptimum, { printed, tied, columns }: Printing): SharedSeriesResult[] {
  return blocks.map(({ problem, tied: known }, b) => {
    const { estimated, values, stopReason } = solutions[b]!
    const { id, model, points } = series[b]!
    const parameters = problem.model.parameters.map(({ name, unit }, j): FittedParameter => {
      const tie = known.find(([parameter]) => parameter === j)
      if (tie) {
        const { series: _, ...shared } = tied[tie[1]]!
        return shared
      }
      if (!Number.isNaN(problem.held[j])) return { name, unit, estimate: toOriginal(problem.model, problem.data, j, problem.held[j]!), standardError: null, interval: null, fixed: true }
      const place = indexOf(estimated, name)
      const column = columns.findIndex(one => 'series' in one && one.series === id && one.parameter === name)
      if (place < 0 || column < 0) return { name, unit, estimate: null, standardError: null, interval: null, fixed: false }
      return printed(column, name, unit, toOriginal(estimated, problem.data, place, values[place]!))
    })
    const residuals = points.map(({ y }, i) => y - (estimated.value(values, problem.data.x[i]!) * problem.data.yScale + problem.data.yOffset))
    return { id, model, n: points.length, stopReason, parameters, residuals }
  })
}
