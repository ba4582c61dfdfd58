import { newStockContract, stockContract } from '#shared/contracts/materials'
import { projectParams } from '#shared/contracts/projects'
import { makeStock } from '~~/server/services/materials'
import { projectEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Makes a stock. */
export default route({
  summary: 'Make a stock',
  access: projectEditor,
  params: projectParams,
  input: newStockContract,
  answer: stockContract,
  status: 201,
  handle: ({ person, params, input }) => makeStock(person.id, params.project, input),
})
