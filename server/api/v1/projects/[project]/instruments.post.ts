import { newInstrumentContract, instrumentContract } from '#shared/contracts/materials'
import { projectParams } from '#shared/contracts/projects'
import { makeInstrument } from '~~/server/services/instruments'
import { projectEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Makes an instrument. */
export default route({
  summary: 'Make an instrument',
  access: projectEditor,
  params: projectParams,
  input: newInstrumentContract,
  answer: instrumentContract,
  status: 201,
  handle: ({ person, params, input }) => makeInstrument(person.id, params.project, input),
})
