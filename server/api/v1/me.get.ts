import { meContract } from '#shared/contracts/me'
import { describeMe } from '~~/server/services/me'
import { signedIn } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** The signed-in person with labs, projects and roles. */
export default route({
  summary: 'Who am I',
  access: signedIn,
  answer: meContract,
  handle: ({ person }) => describeMe(person),
})
