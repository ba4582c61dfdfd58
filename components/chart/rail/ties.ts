import { assignLanes } from './lanes'

/** A run of neighbours in which no pair differs: first and last place, and the lane of its bracket. */
export interface Tie {
  first: number
  last: number
  lane: number
}

/**
 * The longest runs of neighbours in which no pair differs, each spanned by one bracket.
 *
 * @param count how many stand in the order
 * @param differs whether the two at these places differ at the level of the view
 */
export function findTies(count: number, differs: (a: number, b: number) => boolean): Tie[] {
  const runs: { first: number, last: number }[] = []
  for (let first = 0; first < count - 1; first++) {
    let last = first
    while (last + 1 < count && agreesWithAll(first, last, last + 1, differs)) last++
    if (last > first && last > (runs.at(-1)?.last ?? -1)) runs.push({ first, last })
  }
  const lanes = assignLanes(runs.map(run => ({ from: run.first, to: run.last + 0.5 })), Math.max(1, runs.length))
  return runs.map((run, index) => ({ ...run, lane: lanes[index]! }))
}

function agreesWithAll(first: number, last: number, next: number, differs: (a: number, b: number) => boolean): boolean {
  for (let place = first; place <= last; place++) if (differs(place, next)) return false
  return true
}

/** A value with its standard error; see `differ`. */
export interface Uncertain {
  value: number
  standardError: number | null
}

const normal97_5 = 1.959964

/** Whether two independent values differ at 95 %; one without a standard error differs from nothing. */
export function differ(a: Uncertain, b: Uncertain): boolean {
  if (a.standardError === null || b.standardError === null) return false
  return Math.abs(a.value - b.value) > normal97_5 * Math.hypot(a.standardError, b.standardError)
}
