import { newProjectContract, projectContract } from '#shared/contracts/projects'
import { makeProject } from '~~/server/services/projects'
import { signedIn } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Makes a project owned by the person. */
export default route({
  summary: 'Make a project',
  access: signedIn,
  input: newProjectContract,
  answer: projectContract,
  status: 201,
  handle: ({ person, input }) => makeProject(person.id, input),
})
