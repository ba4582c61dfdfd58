import { startBootstrapContract } from '#shared/contracts/bootstrap'
import { jobContract } from '#shared/contracts/jobs'
import { seriesParams } from '#shared/contracts/series'
import { startBootstrap } from '~~/server/services/bootstraps'
import { seriesEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Draws the readings of a series anew and fits each draw, as a job to watch. */
export default route({
  summary: 'Bootstrap the current fit of a series',
  access: seriesEditor,
  params: seriesParams,
  input: startBootstrapContract,
  answer: jobContract,
  status: 202,
  handle: ({ person, params, input }) => startBootstrap(person.id, params.series, input),
})
