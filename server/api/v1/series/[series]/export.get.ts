import { seriesParams } from '#shared/contracts/series'
import { exportQuery } from '#shared/contracts/revisions'
import { exportSeries } from '~~/server/services/export/export'
import { seriesReader } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Readings or constants to take away, each with revision, engine and date. */
export default route({
  summary: 'Take away a series',
  access: seriesReader,
  params: seriesParams,
  query: exportQuery,
  answer: null,
  sendsFile: true,
  handle: ({ person, params, query }) => exportSeries(person.id, params.series, query),
})
