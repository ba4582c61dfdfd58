import type { Box } from './types'

/** Dots of one size [px]. */
export interface StippleLayer {
  radius: number
  dots: (readonly [x: number, y: number])[]
}

export interface StippleOptions {
  /** where dots may stand [px] */
  area: Box
  /** height of the curve at a pixel column [px] */
  curve: (x: number) => number
  /** the cloudy side of the curve */
  side: 'above' | 'below'
  /** texts that the dots part around */
  boxes?: readonly Box[]
  /** distance between dots [px] */
  pitch?: number
  /** distance from the curve at which the dots end [px] */
  reach?: number
  /** radius of the dots at the curve [px] */
  radius?: number
}

const clearOfCurve = 4
const clearOfText = { x: 5, y: 1 } as const
const radiusStep = 0.1
const stroke = 0.01

function isInside(x: number, y: number, boxes: readonly Box[]): boolean {
  return boxes.some(box => x > box.left - clearOfText.x && x < box.right + clearOfText.x && y > box.top - clearOfText.y && y < box.bottom + clearOfText.y)
}

/**
 * The stipple that means "cloudy": a hexagonal grid of dots beside a curve, densest at the curve, parted around text.
 * One layer for each radius step of 0.1 px, so that a figure needs a dozen paths, not thousands of circles.
 */
export function stipple(options: StippleOptions): StippleLayer[] {
  const { area, curve, side, boxes = [], pitch = 6.5, reach = 76, radius = 1.25 } = options
  const rowHeight = pitch * Math.sqrt(3) / 2
  const layers = new Map<number, StippleLayer['dots']>()
  for (let row = 0; area.top + row * rowHeight <= area.bottom; row++) {
    const y = area.top + row * rowHeight
    for (let x = area.left + pitch / 4 + (row % 2) * pitch / 2; x <= area.right; x += pitch) {
      const distance = side === 'above' ? curve(x) - y : y - curve(x)
      if (!(distance >= clearOfCurve && distance < reach) || isInside(x, y, boxes)) continue
      const step = Math.round(radius * (1 - distance / reach) / radiusStep)
      if (step < 1) continue
      const dots = layers.get(step) ?? []
      dots.push([x, y])
      layers.set(step, dots)
    }
  }
  return [...layers].sort(([a], [b]) => a - b).map(([step, dots]) => ({ radius: step * radiusStep, dots }))
}

/** Dots as a path of very short strokes, to be drawn with round caps; neighbours in a row are told by their distance alone. */
export function dotsPath(dots: StippleLayer['dots']): string {
  let last: readonly [number, number] | null = null
  return dots.map(([x, y]) => {
    const isNeighbour = last !== null && last[1] === y
    const move = isNeighbour ? `m${(x - last![0] - stroke).toFixed(2)} 0` : `M${x.toFixed(1)} ${y.toFixed(1)}`
    last = isNeighbour ? [x, y] : [Number(x.toFixed(1)), y]
    return `${move}h${stroke}`
  }).join('')
}
