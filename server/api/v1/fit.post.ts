import { fitRequestContract, fitResultContract } from '#shared/contracts/fit'
import { fitFreely, furtherFaults } from '~~/server/services/free-fit'
import { countRequest } from '~~/server/services/rate-limit'
import { anyone } from '~~/server/utils/access'
import { addressOf } from '~~/server/utils/address'
import { config } from '~~/server/utils/config'
import { route } from '~~/server/utils/route'

/** Room for about 100,000 points, so that the limit on points is told in a sentence instead of a cut connection. */
const bodyLimit = 12_000_000

/** Fits readings given in the request; keeps nothing. */
export default route({
  summary: 'Fit a model to readings',
  access: anyone,
  admitRate: event => countRequest(`fit:${addressOf(event)}`, config().ANIONARY_PUBLIC_FIT_PER_MINUTE),
  input: fitRequestContract,
  bodyLimit,
  examineFurther: furtherFaults,
  answer: fitResultContract,
  handle: ({ input }) => fitFreely(input),
})
