const n = (value: number) => value.toFixed(1)

/** A leader that leaves and arrives level: from a marker to its chip, each end with a straight tangent of `reach` [px]. */
export function leaderPath(x1: number, y1: number, x2: number, y2: number, reach = Math.abs(x2 - x1) / 2): string {
  const side = Math.sign(x2 - x1)
  return `M${n(x1)} ${n(y1)}C${n(x1 + side * reach)} ${n(y1)} ${n(x2 - side * reach)} ${n(y2)} ${n(x2)} ${n(y2)}`
}

/** The same, standing: from a marker above to its label below. */
export function droppedLeaderPath(x1: number, y1: number, x2: number, y2: number): string {
  const middle = (y1 + y2) / 2
  return `M${n(x1)} ${n(y1)}C${n(x1)} ${n(middle)} ${n(x2)} ${n(middle)} ${n(x2)} ${n(y2)}`
}

/** A whisker along y with caps of 5 px. */
export function standingWhisker(x: number, from: number, to: number): string {
  return `M${n(x)} ${n(from)}V${n(to)}M${n(x - 2.5)} ${n(from)}h5M${n(x - 2.5)} ${n(to)}h5`
}

/** A whisker along x with caps. */
export function lyingWhisker(y: number, from: number, to: number, cap = 6): string {
  return `M${n(from)} ${n(y)}H${n(to)}M${n(from)} ${n(y - cap / 2)}v${cap}M${n(to)} ${n(y - cap / 2)}v${cap}`
}

/** A bracket that stands at x and reaches towards the entries by `depth` [px]. */
export function bracketPath(x: number, from: number, to: number, depth: number): string {
  return `M${n(x + depth)} ${n(from)}h${n(-depth)}V${n(to)}h${n(depth)}`
}

/** One wave of the pair that sits on a bracket. */
export function wavePath(x: number, y: number): string {
  return `M${n(x - 6)} ${n(y)}q3 -3.4 6 0t6 0`
}
