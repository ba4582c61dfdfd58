import { seriesContract, seriesParams } from '#shared/contracts/series'
import { showSeries } from '~~/server/services/series'
import { seriesReader } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** One series: readings, current fit, how the models compare, revisions. */
export default route({
  summary: 'One series',
  access: seriesReader,
  params: seriesParams,
  answer: seriesContract,
  handle: ({ person, params }) => showSeries(person.id, params.series),
})
