import { draftContract, keepDraftContract } from '#shared/contracts/revisions'
import { seriesParams } from '#shared/contracts/series'
import { keepDraft } from '~~/server/services/drafts'
import { seriesEditor } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'

/** Bytes: thousands of typed cells. */
const largestDraft = 200_000

/** Keeps what is typed, in place of the draft before. */
export default route({
  summary: 'Keep the draft of a series',
  access: seriesEditor,
  params: seriesParams,
  input: keepDraftContract,
  bodyLimit: largestDraft,
  answer: draftContract,
  handle: ({ person, params, input }) => keepDraft(person.id, params.series, input),
})
