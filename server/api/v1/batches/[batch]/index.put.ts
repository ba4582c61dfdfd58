import { batchContract, batchParams, newBatchContract } from '#shared/contracts/campaigns'
import { changeBatch } from '~~/server/services/batches'
import { batchEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Changes a batch; the whole form again. */
export default route({
  summary: 'Change a batch',
  access: batchEditor,
  params: batchParams,
  input: newBatchContract,
  answer: batchContract,
  handle: ({ person, params, input }) => changeBatch(person.id, params.batch, input),
})
