import { z } from 'zod'
import { checkReadiness } from '~~/server/services/readiness'
import { anyone } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** 200 when database, storage and migrations are as this build needs them; 503 names what is missing. */
export default route({
  summary: 'Is everything ready',
  access: anyone,
  answer: z.object({ status: z.literal('ready') }),
  handle: checkReadiness,
})
