import { commitImportContract, committedContract, importParams } from '#shared/contracts/imports'
import { commitImport } from '~~/server/services/imports/commit-import'
import { importEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Makes readings of the table, all or none, and fits every series they touch. */
export default route({
  summary: 'Commit an import',
  access: importEditor,
  params: importParams,
  input: commitImportContract,
  isBodyOptional: true,
  answer: committedContract,
  status: 201,
  handle: ({ person, params, input }) => commitImport(person.id, params.import, input),
})
