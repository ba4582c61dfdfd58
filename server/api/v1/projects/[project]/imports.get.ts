import { listOf, pageQuery } from '#shared/contracts/common'
import { importSummaryContract } from '#shared/contracts/imports'
import { projectParams } from '#shared/contracts/projects'
import { listImports } from '~~/server/services/imports/list-imports'
import { projectMember } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Imports of a project, open and done, newest first. */
export default route({
  summary: 'Imports of a project',
  access: projectMember,
  params: projectParams,
  query: pageQuery,
  answer: listOf(importSummaryContract),
  handle: ({ person, params, query }) => listImports(person.id, params.project, query),
})
