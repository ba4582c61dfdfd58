import { batchContract, campaignParams, newBatchContract } from '#shared/contracts/campaigns'
import { makeBatch } from '~~/server/services/batches'
import { campaignEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Makes a batch; its blanks come with readings or by hand. */
export default route({
  summary: 'Make a batch',
  access: campaignEditor,
  params: campaignParams,
  input: newBatchContract,
  answer: batchContract,
  status: 201,
  handle: ({ person, params, input }) => makeBatch(person.id, params.campaign, input),
})
