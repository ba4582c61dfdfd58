import { spawn } from 'node:child_process'
import { root } from './places.mjs'

/**
 * @typedef {object} Finished
 * @property {number} code exit code; 1 when a signal ended it
 * @property {string} stdout
 * @property {string} stderr
 */

/** Long commands whose output the person sees; a signal to us ends them too. @type {Set<import('node:child_process').ChildProcess>} */
const shown = new Set()

/** Ends npm, the build or a test run in the middle. */
export function interruptShown() {
  for (const child of shown) child.kill('SIGTERM')
}

/**
 * Runs a command to its end, without a terminal on stdin. Never rejects for a failed command.
 * @param {string[]} command program and arguments
 * @param {{ env?: NodeJS.ProcessEnv, show?: boolean, cwd?: string, input?: string }} [options] show: straight to our own output
 * @returns {Promise<Finished>}
 */
export function run([program = '', ...args], { env, show = false, cwd = root, input } = {}) {
  return new Promise((done) => {
    const output = show ? 'inherit' : 'pipe'
    /** @type {import('node:child_process').StdioOptions} */
    const stdio = [input === undefined ? 'ignore' : 'pipe', output, output]
    /** @type {import('node:child_process').ChildProcess} */
    const child = spawn(program, args, { cwd, env: { ...process.env, ...env }, stdio })
    if (show) shown.add(child)
    let stdout = ''
    let stderr = ''
    child.stdout?.on('data', chunk => stdout += chunk)
    child.stderr?.on('data', chunk => stderr += chunk)
    child.stdin?.end(input)
    child.on('error', error => done({ code: 127, stdout, stderr: String(error) }))
    child.on('close', (code) => {
      shown.delete(child)
      done({ code: code ?? 1, stdout, stderr })
    })
  })
}

/**
 * Runs a command that has to succeed.
 * @param {string[]} command @param {Parameters<typeof run>[1]} [options]
 * @returns {Promise<string>} its output
 */
export async function must(command, options) {
  const { code, stdout, stderr } = await run(command, options)
  if (code !== 0) throw new Error(`${command.join(' ')} ended with ${code}\n${stderr || stdout}`)
  return stdout
}
