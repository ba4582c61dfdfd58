import { importContract, importParams } from '#shared/contracts/imports'
import { discardImport } from '~~/server/services/imports/change-import'
import { importEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Closes an import without its readings; the file stays. */
export default route({
  summary: 'Discard an import',
  access: importEditor,
  params: importParams,
  answer: importContract,
  handle: ({ person, params }) => discardImport(person.id, params.import),
})
