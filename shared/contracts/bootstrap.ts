import { z } from 'zod'
import { id, instant } from './common'
import { jobContract } from './jobs'
import { bootstrapKinds } from '#shared/science/resampling/resamples'

export const mostBootstrapSamples = 20_000

/** What is to be drawn; the seed is kept with the result, so that it can be drawn again. */
export const startBootstrapContract = z.strictObject({
  kind: z.enum(bootstrapKinds).default('residual').describe('residual: scatter drawn anew; case: readings drawn anew by concentration; parametric: normal scatter'),
  samples: z.number('must be a number').int('must be a whole number').min(100, 'must be 100 or more').max(mostBootstrapSamples, `must be at most ${mostBootstrapSamples}`).default(2_000),
  seed: z.number('must be a number').int('must be a whole number').min(0, 'must be 0 or more').max(2 ** 32 - 1, 'must be below 4294967296').optional().describe('left out: drawn'),
  confidence: z.number('must be a number').min(0.5, 'must be 0.5 or more').max(0.9999, 'must be at most 0.9999').default(0.95),
})
export type StartBootstrap = z.infer<typeof startBootstrapContract>

const ends = z.object({ lower: z.number().nullable(), upper: z.number().nullable() })
const band = z.object({ lower: z.array(z.number().nullable()), upper: z.array(z.number().nullable()) })

export const bootstrapResultContract = z.object({
  kind: z.enum(bootstrapKinds), samples: z.number().int(), seed: z.number().int(), confidence: z.number(),
  withoutOptimum: z.number().int().describe('resamples whose best K lay at 0 or without bound'),
  quantities: z.array(z.object({
    name: z.string(), unit: z.string(), estimate: z.number(), standardError: z.number().nullable(),
    percentile: ends, bca: ends.nullable().describe('null where the correction cannot be made'),
  })),
  bands: z.object({
    x: z.array(z.number()), curve: band.describe('where the curve lies, °C'), reading: band.describe('where one new reading would lie, °C'),
  }).nullable(),
})

/** Bootstraps of a series' current fit, newest first, and the one that is on its way. */
export const bootstrapsContract = z.object({
  results: z.array(bootstrapResultContract.extend({ id, at: instant })),
  job: jobContract.nullable(),
})
export type Bootstraps = z.infer<typeof bootstrapsContract>
