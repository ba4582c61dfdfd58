import { newStockContract, stockContract, stockParams } from '#shared/contracts/materials'
import { changeStock } from '~~/server/services/materials'
import { stockEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Changes a stock; the whole form again. */
export default route({
  summary: 'Change a stock',
  access: stockEditor,
  params: stockParams,
  input: newStockContract,
  answer: stockContract,
  handle: ({ person, params, input }) => changeStock(person.id, params.stock, input),
})
