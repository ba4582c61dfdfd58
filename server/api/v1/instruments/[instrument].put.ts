import { newInstrumentContract, instrumentContract, instrumentParams } from '#shared/contracts/materials'
import { changeInstrument } from '~~/server/services/instruments'
import { instrumentEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Changes an instrument; the whole form again. */
export default route({
  summary: 'Change an instrument',
  access: instrumentEditor,
  params: instrumentParams,
  input: newInstrumentContract,
  answer: instrumentContract,
  handle: ({ person, params, input }) => changeInstrument(person.id, params.instrument, input),
})
