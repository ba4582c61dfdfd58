import { readFileSync } from 'node:fs'

/**
 * When a process began, in kernel ticks: tells a process from a later one that got the same number.
 * @param {number} pid @returns {string | null} null when no such process runs
 */
export function startedAt(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    // The program's name may hold spaces and brackets: fields are counted after its closing one.
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ')
    return fields[0] === 'Z' ? null : fields[19] ?? null
  }
  catch {
    return null
  }
}

/**
 * Watches a process that is not our child.
 * @param {number} pid @param {() => void} react
 * @returns {() => void} ends the watch
 */
export function whenGone(pid, react) {
  const watch = setInterval(() => {
    if (startedAt(pid) !== null) return
    clearInterval(watch)
    react()
  }, 500)
  return () => clearInterval(watch)
}

/** @param {number} milliseconds @returns {Promise<void>} */
export function pause(milliseconds) {
  return new Promise(done => setTimeout(done, milliseconds))
}

/**
 * Asks again and again until the answer is yes.
 * @param {() => Promise<boolean> | boolean} question @param {number} seconds
 * @returns {Promise<boolean>} false when time ran out
 */
export async function until(question, seconds) {
  const end = Date.now() + seconds * 1000
  while (!await question()) {
    if (Date.now() > end) return false
    await pause(50)
  }
  return true
}
