import { config } from '~~/server/utils/config'

/** Stops a server with wrong settings at its start, not at the first request that needs one. */
export default defineNitroPlugin(() => {
  try {
    config()
  }
  catch (error) {
    console.error(error instanceof Error ? error.message : error)
    process.exit(1)
  }
})
