import { clearUserSession, getUserSession, replaceUserSession, useRuntimeConfig } from '#imports'
import { getCookie, type H3Event } from 'h3'
import { sessionPerson, type Visitor } from '~~/server/services/sessions'

/** Who asks: the person of the cookie's session as the database knows it now, or nobody. */
export async function visitorOf(event: H3Event): Promise<Visitor | null> {
  const session = await namedSession(event)
  return session ? sessionPerson(session) : null
}

/** Seals a fresh cookie; whatever the browser brought is dropped. */
export async function rememberVisitor(event: H3Event, visitor: Visitor, session: string) {
  await replaceUserSession(event, { user: { id: visitor.id, name: visitor.name }, secure: { session } })
}

/** Drops the cookie and tells which session it named. */
export async function forgetVisitor(event: H3Event): Promise<string | undefined> {
  const session = await namedSession(event)
  await clearUserSession(event)
  return session
}

// Reading a session makes one: who brings no cookie is not given one.
async function namedSession(event: H3Event): Promise<string | undefined> {
  const { session: { name } } = useRuntimeConfig(event)
  if (!name || !getCookie(event, name)) return undefined
  const { secure } = await getUserSession(event)
  return secure?.session
}
