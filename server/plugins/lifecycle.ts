import { defineNitroPlugin, sessionHooks } from '#imports'
import { createError } from 'h3'
import { closeDatabase, onLostConnection } from '~~/server/database/client'
import { sessionPerson } from '~~/server/services/sessions'
import { closeFitPool, warmFitPool } from '~~/server/services/fit-pool'
import { closeTablePool } from '~~/server/services/imports/table-pool'
import { reportLostConnection } from '~~/server/utils/logger'

/** Starts the threads for fits, and ends what is open when the process is asked to stop. */
export default defineNitroPlugin((app) => {
  onLostConnection(reportLostConnection)
  warmFitPool()
  app.hooks.hook('close', async () => {
    await closeFitPool()
    await closeTablePool()
    await closeDatabase()
  })
  // The page asks the session library who is signed in; a session revoked elsewhere is nobody's.
  sessionHooks.hook('fetch', async (session) => {
    const id = session.secure?.session
    if (id && !await sessionPerson(id)) throw createError({ statusCode: 401, message: 'The session has ended' })
  })
})
