import type { Span } from './scale'

/** Dots of one size, as one path of strokes without length. */
export interface StippleStep {
  diameter: number
  path: string
}

interface StippleOptions {
  /** across the spine [px] */
  across: Span
  /** along the spine from clear to dense [px] */
  along: Span
  /** true: the spine lies, so `along` is x */
  lying?: boolean
}

const pitch = 4.2
const row = 3.64
const sizes = { clear: 0, dense: 2.4 } as const

/** The stipple of a spine: hexagonal, none at the end that raises the cloud point, dense at the end that lowers it. */
export function spineStipple({ across, along, lying = false }: StippleOptions): StippleStep[] {
  const steps = new Map<string, string>()
  const length = Math.abs(along[1] - along[0])
  const side = Math.sign(along[1] - along[0])
  for (let rowIndex = 0; rowIndex * row <= length; rowIndex++) {
    const diameter = sizes.clear + (sizes.dense - sizes.clear) * Math.sqrt(rowIndex * row / Math.max(length, 1))
    const key = diameter.toFixed(1)
    if (Number(key) < 0.5) continue
    const place = along[0] + side * rowIndex * row
    for (let x = across[0] + (rowIndex % 2) * pitch / 2; x <= across[1]; x += pitch) {
      const [px, py] = lying ? [place, x] : [x, place]
      steps.set(key, `${steps.get(key) ?? ''}M${px.toFixed(1)} ${py.toFixed(1)}h0`)
    }
  }
  return [...steps].map(([diameter, path]) => ({ diameter: Number(diameter), path }))
}
