import { getRequestHeader } from 'h3'
import { jobContract, jobParams } from '#shared/contracts/jobs'
import { watchJob } from '~~/server/services/jobs'
import { jobWatcher } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** A job's progress as server-sent events named `job`; Last-Event-ID leaves out what was seen. */
export default route({
  summary: 'Watch a job',
  access: jobWatcher,
  params: jobParams,
  answer: jobContract,
  streams: true,
  handle: ({ event, person, params, signal }) =>
    watchJob(person.id, params.job, Number(getRequestHeader(event, 'last-event-id') ?? 0) || 0, signal),
})
