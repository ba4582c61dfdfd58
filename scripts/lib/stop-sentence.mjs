/** A stop that the person at the terminal can act on: one sentence, no stack trace. */
export class StopSentence extends Error {
  name = 'StopSentence'
}

/**
 * Runs a command's main function; a StopSentence is printed alone, anything else with its stack.
 * @param {() => Promise<number | void>} main answers the exit code
 */
export async function runMain(main) {
  try {
    process.exitCode = (await main()) ?? 0
  }
  catch (error) {
    console.error(error instanceof StopSentence ? `\nanionary: ${error.message}` : error)
    process.exitCode = 1
  }
}
