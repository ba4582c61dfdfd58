import { Bootstrap } from '#shared/science/resampling/bootstrap'
import { keepBootstrap, type BootstrapInput } from '../services/bootstraps'
import type { JobContext } from './carry-out'

/** So many draws between two looks at whether to stop: some tens of milliseconds. */
const portion = 250

/** Draws a series anew; nothing is kept before the end, so that a second attempt draws the same from the same seed. */
export async function drawBootstrap({ project, input, inTransaction, report }: JobContext): Promise<void> {
  const { fit, request, options } = input as unknown as BootstrapInput
  const run = new Bootstrap(request, options)
  await report(0, options.samples)
  while (!run.advance(portion)) await report(run.done, options.samples)
  await inTransaction(tx => keepBootstrap(tx, project, fit, run.result()))
  await report(options.samples, options.samples)
}
