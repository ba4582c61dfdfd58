import { newRevisionContract } from '#shared/contracts/revisions'
import { seriesContract, seriesParams } from '#shared/contracts/series'
import { reviseSeries } from '~~/server/services/revisions/make-revision'
import { seriesEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Makes the next revision; 409 with the newer state as `current` where somebody was quicker. */
export default route({
  summary: 'Keep a series as its next revision',
  access: seriesEditor,
  params: seriesParams,
  input: newRevisionContract,
  answer: seriesContract,
  status: 201,
  handle: ({ person, params, input }) => reviseSeries(person.id, params.series, input),
})
