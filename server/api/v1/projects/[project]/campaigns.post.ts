import { campaignContract, newCampaignContract } from '#shared/contracts/campaigns'
import { projectParams } from '#shared/contracts/projects'
import { makeCampaign } from '~~/server/services/campaigns'
import { projectEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Makes a campaign of the person's lab, on its own or like another one. */
export default route({
  summary: 'Make a campaign',
  access: projectEditor,
  params: projectParams,
  input: newCampaignContract,
  answer: campaignContract,
  status: 201,
  handle: ({ person, params, input }) => makeCampaign(person.id, params.project, input),
})
