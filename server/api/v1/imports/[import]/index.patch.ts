import { changeImportContract, importContract, importParams, largestFile } from '#shared/contracts/imports'
import { changeImport } from '~~/server/services/imports/change-import'
import { importEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Says how the table is to be read otherwise, and decides about its rows. */
export default route({
  summary: 'Change how an import reads',
  access: importEditor,
  params: importParams,
  input: changeImportContract,
  bodyLimit: largestFile,
  answer: importContract,
  handle: ({ person, params, input }) => changeImport(person.id, params.import, input),
})
