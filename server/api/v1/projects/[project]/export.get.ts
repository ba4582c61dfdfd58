import { projectParams } from '#shared/contracts/projects'
import { exportQuery } from '#shared/contracts/revisions'
import { exportProject } from '~~/server/services/export/export'
import { projectMember } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Readings or constants to take away, each with revision, engine and date. */
export default route({
  summary: 'Take away a project',
  access: projectMember,
  params: projectParams,
  query: exportQuery,
  answer: null,
  sendsFile: true,
  handle: ({ person, params, query }) => exportProject(person.id, params.project, query),
})
