import { z } from 'zod'
import { modelNames, noteCodes, stopReasons, weightings } from '#shared/science/fitting/types'

/** The most points one fit takes. */
export const maximumPoints = 5_000

const finite = z.number('must be a finite number')
const parameterOptions = z.strictObject({
  fixed: finite.optional().describe('value to hold, treated as exact'),
  min: finite.optional(),
  max: finite.optional(),
  start: finite.optional(),
})

export const pointContract = z.strictObject({
  x: finite.describe('concentration of the varied salt, mol/L'),
  y: finite.describe('cloud point, °C'),
  sd: finite.optional().describe('standard uncertainty of y, K'),
  n: finite.optional().describe('independent samples behind y'),
})

const expressionModel = z.strictObject({
  expression: z.string().min(1).max(500).describe('right-hand side of y = …'),
  variable: z.string().min(1).max(30),
  parameters: z.record(z.string().max(30), parameterOptions.extend({ start: finite })),
})

/** What POST /api/v1/fit takes. Rules that need the numbers themselves are checked by the engine, all at once. */
export const fitRequestContract = z.strictObject({
  model: z.union([z.enum(modelNames), expressionModel]),
  points: z.array(pointContract).max(maximumPoints, `at most ${maximumPoints} points in one fit`),
  parameters: z.record(z.string().max(30), parameterOptions).optional(),
  weighting: z.enum(weightings).optional(),
  sdMeaning: z.enum(['relative', 'absolute']).optional(),
  confidence: finite.min(0.5).max(0.9999).optional().describe('level of the intervals, default 0.95'),
  intervals: z.enum(['profile', 't']).optional(),
})

const nullable = z.number().nullable()

export const noteContract = z.object({
  code: z.enum(noteCodes),
  severity: z.enum(['info', 'caution', 'problem']),
  values: z.record(z.string(), z.union([z.number(), z.string(), z.boolean(), z.null()])),
})

export const fittedParameterContract = z.object({
  name: z.string(),
  unit: z.string(),
  estimate: nullable,
  standardError: nullable,
  interval: z.object({ level: z.number(), lower: nullable, upper: nullable, method: z.enum(['profile', 't']) }).nullable(),
  fixed: z.boolean(),
})

export const derivedContract = z.object({ name: z.string(), unit: z.string(), estimate: z.number(), standardError: nullable })

/** What a fit gives back; the shape of FitResult in shared/science. */
export const fitResultContract = z.object({
  model: z.enum([...modelNames, 'expression']),
  n: z.number().int(),
  degreesOfFreedom: z.number().int(),
  converged: z.boolean(),
  stopReason: z.enum(stopReasons),
  weighting: z.enum(weightings),
  sdMeaning: z.enum(['relative', 'absolute']),
  parameters: z.array(fittedParameterContract),
  covariance: z.array(z.array(z.number())).nullable().describe('free parameters, in the order of parameters'),
  correlation: z.array(z.array(z.number())).nullable(),
  residualSumOfSquares: z.number(),
  residualStandardDeviation: nullable,
  aicc: nullable,
  bic: nullable,
  residuals: z.array(z.object({
    x: z.number(), y: z.number(), fitted: z.number(), residual: z.number(), standardized: nullable, leverage: nullable,
  })),
  derived: z.array(derivedContract),
  notes: z.array(noteContract),
  engine: z.object({ name: z.literal('anionary'), version: z.string() }),
})
