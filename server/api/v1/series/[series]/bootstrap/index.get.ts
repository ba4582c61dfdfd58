import { bootstrapsContract } from '#shared/contracts/bootstrap'
import { seriesParams } from '#shared/contracts/series'
import { showBootstraps } from '~~/server/services/bootstraps'
import { seriesReader } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** What was drawn for the current fit, and what is being drawn. */
export default route({
  summary: 'Bootstraps of the current fit of a series',
  access: seriesReader,
  params: seriesParams,
  answer: bootstrapsContract,
  handle: ({ person, params }) => showBootstraps(person.id, params.series),
})
