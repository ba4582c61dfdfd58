import { newSampleContract, sampleContract, sampleParams } from '#shared/contracts/materials'
import { changeSample } from '~~/server/services/materials'
import { sampleEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Changes a sample; the whole form again. */
export default route({
  summary: 'Change a sample',
  access: sampleEditor,
  params: sampleParams,
  input: newSampleContract,
  answer: sampleContract,
  handle: ({ person, params, input }) => changeSample(person.id, params.sample, input),
})
