import { createHash } from 'node:crypto'
import { existsSync, readFileSync, readdirSync } from 'node:fs'
import { join, relative } from 'node:path'
import { root } from './places.mjs'

/** Top folders whose content never reaches the build. */
const NOT_BUILT = new Set(['node_modules', 'tests', 'docs', 'coverage', 'test-results', 'playwright-report'])

/** Hash over every file that the build reads: names and content. @returns {string} */
export function hashOfSources() {
  const hash = createHash('sha256').update(process.version)
  for (const file of sourceFiles(root)) hash.update(relative(root, file)).update('\0').update(readFileSync(file))
  return hash.digest('hex')
}

/** @param {string[]} names files of the clone @returns {string} */
export function hashOfFiles(names) {
  const hash = createHash('sha256').update(`${process.version} ${process.arch}`)
  for (const name of names) hash.update(readFileSync(join(root, name)))
  return hash.digest('hex')
}

/** @param {string} file @param {string} stamp */
export function isStamped(file, stamp) {
  return existsSync(file) && readFileSync(file, 'utf8') === stamp
}

/** @param {string} folder @returns {string[]} */
function sourceFiles(folder) {
  return readdirSync(folder, { withFileTypes: true })
    .filter(entry => isSource(folder, entry.name))
    .sort((a, b) => a.name < b.name ? -1 : 1)
    .flatMap((entry) => {
      const path = join(folder, entry.name)
      if (entry.isDirectory()) return sourceFiles(path)
      return entry.isFile() ? [path] : []
    })
}

/** @param {string} folder @param {string} name */
function isSource(folder, name) {
  if (name.startsWith('.') || name.endsWith('.md') || name.endsWith('.log')) return false
  if (folder === root) return !NOT_BUILT.has(name)
  return folder !== join(root, 'scripts') || name === 'build'
}
