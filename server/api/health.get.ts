import { z } from 'zod'
import { anyone } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Answers as long as the process is alive; asks nothing of anything else. */
export default route({
  summary: 'Is the web server alive',
  access: anyone,
  answer: z.object({ status: z.literal('alive') }),
  handle: () => ({ status: 'alive' as const }),
})
