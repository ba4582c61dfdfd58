import { draftAnswerContract } from '#shared/contracts/revisions'
import { seriesParams } from '#shared/contracts/series'
import { showDraft } from '~~/server/services/drafts'
import { seriesEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** What the person has typed on the series and not kept yet. */
export default route({
  summary: 'The draft of a series',
  access: seriesEditor,
  params: seriesParams,
  answer: draftAnswerContract,
  handle: async ({ person, params }) => ({ draft: await showDraft(person.id, params.series) }),
})
