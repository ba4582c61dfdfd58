import { existsSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { root } from './places.mjs'
import { must, run } from './run.mjs'
import { hashOfFiles, hashOfSources, isStamped } from './stamps.mjs'
import { StopSentence } from './stop-sentence.mjs'

const OLDEST_NODE = { major: 20, minor: 19 }

/** Stops on a Node.js that the packages do not run on. @param {string} [version] */
export function checkNode(version = process.versions.node) {
  const [major = 0, minor = 0] = version.split('.').map(Number)
  if (major > OLDEST_NODE.major || (major === OLDEST_NODE.major && minor >= OLDEST_NODE.minor)) return
  throw new StopSentence(`Node.js ${version} is too old: install Node.js ${OLDEST_NODE.major}.${OLDEST_NODE.minor} or newer.`)
}

/** Installs the npm packages when the lock file changed since they were installed here. */
export async function installPackages() {
  const stamp = hashOfFiles(['package.json', 'package-lock.json'])
  const stampFile = join(root, 'node_modules', '.anionary-stamp')
  if (isStamped(stampFile, stamp)) return
  console.log('Installing npm packages …')
  const { code } = await run(['npm', 'ci', '--include=dev', '--no-audit', '--no-fund'], { show: true })
  if (code !== 0) throw new StopSentence('npm ci failed; its message stands above. Check the network or registry, then run this again.')
  writeFileSync(stampFile, stamp)
}

/** Builds when a source changed since the last build. @returns {Promise<boolean>} whether it built */
export async function buildApp() {
  const stamp = hashOfSources()
  const stampFile = join(root, '.output', '.anionary-stamp')
  if (isStamped(stampFile, stamp)) return false
  console.log('Building …')
  const { code } = await run(nuxt('build'), { show: true, env: { NODE_ENV: 'production', NUXT_TELEMETRY_DISABLED: '1' } })
  if (code !== 0) throw new StopSentence('the build failed; its message stands above.')
  writeFileSync(stampFile, stamp)
  return true
}

/** Writes the types and lint rules that Nuxt generates. */
export async function prepareApp() {
  await must(nuxt('prepare'), { env: { NUXT_TELEMETRY_DISABLED: '1' } })
  if (!existsSync(join(root, '.nuxt', 'eslint.config.mjs'))) throw new Error('nuxt prepare wrote no lint rules')
}

/** @param {string} command */
function nuxt(command) {
  return [process.execPath, join(root, 'node_modules', 'nuxt', 'bin', 'nuxt.mjs'), command]
}
