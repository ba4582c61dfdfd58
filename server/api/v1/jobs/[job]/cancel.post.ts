import { jobContract, jobParams } from '#shared/contracts/jobs'
import { cancelJob } from '~~/server/services/jobs'
import { jobOwner } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Asks a job to stop after the piece it is at. */
export default route({
  summary: 'Stop a job',
  access: jobOwner,
  params: jobParams,
  answer: jobContract,
  handle: ({ person, params }) => cancelJob(person.id, params.job),
})
