import { projectFrontContract } from '#shared/contracts/front'
import { projectParams } from '#shared/contracts/projects'
import { showFront } from '~~/server/services/front/show-front'
import { projectMember } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** What changed since the person's last visit, the campaigns, what waits and what moved. */
export default route({
  summary: 'The front page of a project',
  access: projectMember,
  params: projectParams,
  answer: projectFrontContract,
  handle: ({ person, params }) => showFront(person.id, params.project),
})
