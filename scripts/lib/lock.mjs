import { existsSync, linkSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { startedAt } from './processes.mjs'
import { StopSentence } from './stop-sentence.mjs'

/**
 * One stack a data folder: takes the folder, or stops and says who has it.
 * @param {string} data @param {string} purpose what runs, for the sentence a second one prints
 * @returns {{ release: () => void, isAfterCrash: boolean }}
 */
export function lock(data, purpose) {
  const file = join(data, 'running.json')
  const left = readLock(file)
  if (left && isAlive(left)) {
    throw new StopSentence(`${left.purpose} already runs from ${data} (process ${left.pid}): stop it first, or set ANIONARY_DATA and PORT to run another beside it.`)
  }
  if (left) rmSync(file, { force: true })
  takeFile(file, JSON.stringify({ pid: process.pid, startedAt: startedAt(process.pid), purpose }))
  return { release: () => rmSync(file, { force: true }), isAfterCrash: left !== null }
}

/** @param {string} data @returns {boolean} whether something of ours runs from the folder */
export function isLocked(data) {
  const left = readLock(join(data, 'running.json'))
  return left !== null && isAlive(left)
}

/** @param {{ pid: number, startedAt: string }} holder */
function isAlive(holder) {
  return startedAt(holder.pid) === holder.startedAt
}

/** @param {string} file @returns {{ pid: number, startedAt: string, purpose: string } | null} */
function readLock(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null
}

/** A link either makes the whole file or fails: of two that start at once, one wins. @param {string} file @param {string} content */
function takeFile(file, content) {
  const draft = `${file}.${process.pid}`
  writeFileSync(draft, content)
  try {
    linkSync(draft, file)
  }
  catch {
    throw new StopSentence(`another start took ${file} at the same moment: try again.`)
  }
  finally {
    rmSync(draft, { force: true })
  }
}
