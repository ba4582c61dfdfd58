import { materialsContract } from '#shared/contracts/materials'
import { projectParams } from '#shared/contracts/projects'
import { listMaterials } from '~~/server/services/materials'
import { projectMember } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Samples, stocks and instruments to choose from. */
export default route({
  summary: 'Materials of a project',
  access: projectMember,
  params: projectParams,
  answer: materialsContract,
  handle: ({ person, params }) => listMaterials(person.id, params.project),
})
