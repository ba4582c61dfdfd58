import { campaignContract, campaignParams, changeCampaignContract } from '#shared/contracts/campaigns'
import { changeCampaign } from '~~/server/services/campaigns'
import { campaignEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Changes a campaign; the whole form again. */
export default route({
  summary: 'Change a campaign',
  access: campaignEditor,
  params: campaignParams,
  input: changeCampaignContract,
  answer: campaignContract,
  handle: ({ person, params, input }) => changeCampaign(person.id, params.campaign, input),
})
