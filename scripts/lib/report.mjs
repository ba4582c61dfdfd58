import { existsSync, readFileSync } from 'node:fs'
import { run } from './run.mjs'

/**
 * @typedef {object} Counts tests of one stage
 * @property {number} passed
 * @property {number} failed
 * @property {string} [why] why it failed, when no test says so
 */

/** What `npm test` did, stage by stage. */
export class Report {
  /** @type {{ name: string, passed: number, failed: number, seconds: number, why?: string }[]} */
  stages = []

  /**
   * Runs a stage and keeps its counts; a stage that throws counts as one failure.
   * @param {string} name @param {() => Promise<Counts>} work
   * @returns {Promise<boolean>} whether nothing failed
   */
  async stage(name, work) {
    console.log(`\n── ${name}`)
    const began = Date.now()
    const { passed, failed, why } = await work().catch(asFailure)
    if (why) console.log(why)
    this.stages.push({ name, passed, failed, seconds: (Date.now() - began) / 1000, why })
    return failed === 0
  }

  /** @param {string} name @param {string} why */
  notRun(name, why) {
    this.stages.push({ name, passed: 0, failed: 1, seconds: 0, why: `not run: ${why}` })
  }

  /** Prints a line a stage and, last, the line that sums up. @returns {number} exit code */
  print() {
    console.log('\n── summary')
    for (const { name, passed, failed, seconds, why } of this.stages) {
      const state = failed ? 'FAILED' : 'ok'
      const counts = passed + failed ? `${passed} passed, ${failed} failed` : ''
      console.log(`${state.padEnd(7)} ${name.padEnd(20)} ${seconds.toFixed(1).padStart(6)} s  ${counts}${why?.startsWith('not run') ? `  (${why})` : ''}`)
    }
    const passed = this.stages.reduce((sum, stage) => sum + stage.passed, 0)
    const failed = this.stages.reduce((sum, stage) => sum + stage.failed, 0)
    console.log(`\n${passed} passed, ${failed} failed`)
    return failed ? 1 : 0
  }
}

/** @param {Error} error @returns {Counts} */
function asFailure(error) {
  return { passed: 0, failed: 1, why: error.message }
}

/**
 * A check that either holds or not, and has no tests to count.
 * @param {string[]} command @param {NodeJS.ProcessEnv} [env]
 * @returns {Promise<Counts>}
 */
export async function check(command, env) {
  const { code } = await run(command, { show: true, env })
  return { passed: 0, failed: code === 0 ? 0 : 1 }
}

/**
 * Runs tests and counts them from the runner's JSON report.
 * @template RunnerReport
 * @param {string[]} command @param {NodeJS.ProcessEnv} env
 * @param {string} reportFile where the runner writes its report
 * @param {(report: RunnerReport) => Counts} count
 * @returns {Promise<Counts>}
 */
export async function countTests(command, env, reportFile, count) {
  const { code } = await run(command, { show: true, env })
  const counts = existsSync(reportFile) ? count(JSON.parse(readFileSync(reportFile, 'utf8'))) : { passed: 0, failed: 0 }
  // A runner can fail without a failed test: a file that does not load, no test at all.
  return { passed: counts.passed, failed: code === 0 ? counts.failed : Math.max(1, counts.failed) }
}

/**
 * A test that was left out is an unkept promise: it counts as failed.
 * @param {{ numPassedTests: number, numFailedTests: number, numPendingTests: number, numTodoTests: number }} report
 * @returns {Counts}
 */
export function countVitest({ numPassedTests, numFailedTests, numPendingTests, numTodoTests }) {
  return { passed: numPassedTests, failed: numFailedTests + numPendingTests + numTodoTests }
}

/**
 * @param {{ stats: { expected: number, unexpected: number, flaky: number, skipped: number }, errors: unknown[] }} report
 * @returns {Counts}
 */
export function countPlaywright({ stats, errors }) {
  return { passed: stats.expected, failed: stats.unexpected + stats.flaky + stats.skipped + errors.length }
}
