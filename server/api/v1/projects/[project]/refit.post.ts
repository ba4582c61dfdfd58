import { jobContract } from '#shared/contracts/jobs'
import { projectParams } from '#shared/contracts/projects'
import { startRefit } from '~~/server/services/jobs'
import { projectEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Fits every series of the project again, as a job to watch. */
export default route({
  summary: 'Fit all series of a project again',
  access: projectEditor,
  params: projectParams,
  answer: jobContract,
  status: 202,
  handle: ({ person, params }) => startRefit(person.id, params.project),
})
