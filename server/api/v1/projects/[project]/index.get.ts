import { projectDetailContract, projectParams } from '#shared/contracts/projects'
import { showProject } from '~~/server/services/projects'
import { projectMember } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** One project with its labs, campaigns and members. */
export default route({
  summary: 'One project',
  access: projectMember,
  params: projectParams,
  answer: projectDetailContract,
  handle: ({ person, params }) => showProject(person.id, params.project),
})
