import { newSampleContract, sampleContract } from '#shared/contracts/materials'
import { projectParams } from '#shared/contracts/projects'
import { makeSample } from '~~/server/services/materials'
import { projectEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Makes a sample. */
export default route({
  summary: 'Make a sample',
  access: projectEditor,
  params: projectParams,
  input: newSampleContract,
  answer: sampleContract,
  status: 201,
  handle: ({ person, params, input }) => makeSample(person.id, params.project, input),
})
