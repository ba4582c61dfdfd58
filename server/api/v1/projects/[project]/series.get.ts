import { listOf, pageQuery } from '#shared/contracts/common'
import { projectParams } from '#shared/contracts/projects'
import { seriesSummaryContract } from '#shared/contracts/series'
import { listSeries } from '~~/server/services/series'
import { projectMember } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** The series of a project with their newest readings and current fits. */
export default route({
  summary: 'Series of a project',
  access: projectMember,
  params: projectParams,
  query: pageQuery,
  answer: listOf(seriesSummaryContract),
  handle: ({ person, params, query }) => listSeries(person.id, params.project, query),
})
