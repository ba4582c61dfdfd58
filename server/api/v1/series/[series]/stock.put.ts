import { seriesStockContract } from '#shared/contracts/revisions'
import { seriesContract, seriesParams } from '#shared/contracts/series'
import { linkStock } from '~~/server/services/stocks'
import { seriesEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Says which stock the concentrations of a series rest on. */
export default route({
  summary: 'Link the stock of a series',
  access: seriesEditor,
  params: seriesParams,
  input: seriesStockContract,
  answer: seriesContract,
  handle: ({ person, params, input }) => linkStock(person.id, params.series, input.stock),
})
