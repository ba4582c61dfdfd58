import { batchParams } from '#shared/contracts/campaigns'
import { blanksContract, newBlanksContract } from '#shared/contracts/revisions'
import { reviseBlanks } from '~~/server/services/revisions/revise-blanks'
import { batchEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Changes the blanks of a batch for all its series; 409 with the newer state as `current`. */
export default route({
  summary: 'Keep the blanks of a batch',
  access: batchEditor,
  params: batchParams,
  input: newBlanksContract,
  answer: blanksContract,
  status: 201,
  handle: ({ person, params, input }) => reviseBlanks(person.id, params.batch, input),
})
