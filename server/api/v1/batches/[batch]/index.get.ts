import { batchParams } from '#shared/contracts/campaigns'
import { blanksContract } from '#shared/contracts/revisions'
import { showBlanks } from '~~/server/services/revisions/revise-blanks'
import { batchReader } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** The blanks of a batch with their history. */
export default route({
  summary: 'The blanks of a batch',
  access: batchReader,
  params: batchParams,
  answer: blanksContract,
  handle: ({ person, params }) => showBlanks(person.id, params.batch),
})
