import { importContract, importParams } from '#shared/contracts/imports'
import { showImport } from '~~/server/services/imports/show-import'
import { importReader } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** One import: how its table reads, what needs a look, what is asked. */
export default route({
  summary: 'One import',
  access: importReader,
  params: importParams,
  answer: importContract,
  handle: ({ person, params }) => showImport(person.id, params.import),
})
