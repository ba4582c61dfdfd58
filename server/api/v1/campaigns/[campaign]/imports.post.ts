import { campaignParams } from '#shared/contracts/campaigns'
import { importContract, largestFile, pasteContract } from '#shared/contracts/imports'
import { startImport } from '~~/server/services/imports/start-import'
import { campaignEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Reads a table, as a file or pasted, and opens an import of it; nothing becomes a reading before the commit. */
export default route({
  summary: 'Start an import',
  access: campaignEditor,
  params: campaignParams,
  input: pasteContract,
  takesFile: true,
  bodyLimit: largestFile,
  answer: importContract,
  status: 201,
  handle: ({ person, params, input, file }) => startImport(person.id, params.campaign, file ?? input),
})
