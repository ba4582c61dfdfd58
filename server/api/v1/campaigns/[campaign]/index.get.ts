import { campaignContract, campaignParams } from '#shared/contracts/campaigns'
import { showCampaign } from '~~/server/services/campaigns'
import { campaignReader } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** One campaign with its conditions, batches and series. */
export default route({
  summary: 'One campaign',
  access: campaignReader,
  params: campaignParams,
  answer: campaignContract,
  handle: ({ person, params }) => showCampaign(person.id, params.campaign),
})
