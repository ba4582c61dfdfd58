import type { Span } from './scale'

/** One stretch of a broken axis: which entries it holds and the values it shows. */
export interface AxisPart {
  first: number
  last: number
  span: Span
}

interface Extent {
  lower: number
  upper: number
}

const spanOf = (extents: readonly Extent[]): Span => [Math.min(...extents.map(e => e.lower)), Math.max(...extents.map(e => e.upper))]

/**
 * Breaks an axis once at the widest gap between neighbours, where one axis for all would leave that gap
 * taking more than an eighth of its length: rows on a phone then keep whiskers longer than their markers.
 *
 * @param extents what each entry covers, in order from the highest value down
 */
export function axisParts(extents: readonly Extent[]): AxisPart[] {
  if (extents.length === 0) return []
  const whole: AxisPart = { first: 0, last: extents.length - 1, span: spanOf(extents) }
  const gaps = extents.slice(1).map((extent, index) => extents[index]!.lower - extent.upper)
  const widest = Math.max(0, ...gaps)
  const at = gaps.indexOf(widest) + 1
  const width = whole.span[1] - whole.span[0]
  if (extents.length < 4 || widest < width / 8 || at < 2 || at > extents.length - 2) return [whole]
  return [
    { first: 0, last: at - 1, span: spanOf(extents.slice(0, at)) },
    { first: at, last: extents.length - 1, span: spanOf(extents.slice(at)) },
  ]
}
