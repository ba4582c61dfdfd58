import { seriesParams } from '#shared/contracts/series'
import { discardDraft } from '~~/server/services/drafts'
import { seriesEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Forgets what was typed. */
export default route({
  summary: 'Discard the draft of a series',
  access: seriesEditor,
  params: seriesParams,
  answer: null,
  handle: ({ person, params }) => discardDraft(person.id, params.series),
})
