import { listOf, pageQuery } from '#shared/contracts/common'
import { projectContract } from '#shared/contracts/projects'
import { listProjects } from '~~/server/services/projects'
import { signedIn } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** The projects the person is a member of. */
export default route({
  summary: 'My projects',
  access: signedIn,
  query: pageQuery,
  answer: listOf(projectContract),
  handle: ({ person, query }) => listProjects(person.id, query),
})
