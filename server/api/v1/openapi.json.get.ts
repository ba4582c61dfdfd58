import { z } from 'zod'
import { describeApi } from '~~/server/utils/openapi'
import { anyone } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** This API's own description, built from the declarations of its routes. */
export default route({
  summary: 'The API described as OpenAPI 3.1',
  access: anyone,
  answer: z.record(z.string(), z.unknown()),
  handle: describeApi,
})
