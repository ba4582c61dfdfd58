import { revokeSession } from '~~/server/services/sessions'
import { anyone } from '~~/server/utils/access'
import { route } from '~~/server/utils/route'
import { forgetVisitor } from '~~/server/utils/visitor'

/** Ends the session on the server and drops the cookie; without a session it does nothing. */
export default route({
  summary: 'Sign out',
  access: anyone,
  answer: null,
  async handle({ event }) {
    const session = await forgetVisitor(event)
    if (session) await revokeSession(session)
  },
})
