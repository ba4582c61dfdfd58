import { revisionParams, seriesStateContract } from '#shared/contracts/revisions'
import { showRevision } from '~~/server/services/revisions/show-revision'
import { seriesReader } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** One revision with what it held and the fit that belonged to it. */
export default route({
  summary: 'One revision of a series',
  access: seriesReader,
  params: revisionParams,
  answer: seriesStateContract,
  handle: ({ person, params }) => showRevision(person.id, params.series, params.revision),
})
