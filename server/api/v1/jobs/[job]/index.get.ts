import { jobContract, jobParams } from '#shared/contracts/jobs'
import { showJob } from '~~/server/services/jobs'
import { jobWatcher } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** How far a job is. */
export default route({
  summary: 'One job',
  access: jobWatcher,
  params: jobParams,
  answer: jobContract,
  handle: ({ person, params }) => showJob(person.id, params.job),
})
