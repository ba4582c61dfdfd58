import { projectParams } from '#shared/contracts/projects'
import { visit } from '~~/server/services/front/visits'
import { projectMember } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Notes that the person is looking at the project; within half an hour it stays the same visit. */
export default route({
  summary: 'Note a visit to a project',
  access: projectMember,
  params: projectParams,
  answer: null,
  handle: ({ person, params }) => visit(person.id, params.project),
})
