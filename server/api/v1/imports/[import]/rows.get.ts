import { importParams, importRowsContract, importRowsQuery } from '#shared/contracts/imports'
import { showImportRows } from '~~/server/services/imports/show-import'
import { importReader } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Rows of the table in the order of the file. */
export default route({
  summary: 'Rows of an import',
  access: importReader,
  params: importParams,
  query: importRowsQuery,
  answer: importRowsContract,
  handle: ({ person, params, query }) => showImportRows(person.id, params.import, query),
})
