import { changeProjectContract, projectContract, projectParams } from '#shared/contracts/projects'
import { changeProject } from '~~/server/services/projects'
import { projectOwner } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Changes name and question. */
export default route({
  summary: 'Change a project',
  access: projectOwner,
  params: projectParams,
  input: changeProjectContract,
  answer: projectContract,
  handle: ({ person, params, input }) => changeProject(person.id, params.project, input),
})
