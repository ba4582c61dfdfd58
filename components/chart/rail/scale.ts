/** A straight scale from values to pixels; the rail and the figures beside it read the same one. */
export interface LinearScale {
  pixel: (value: number) => number
  value: (pixel: number) => number
}

export type Span = readonly [number, number]

/** Maps `values[0]` to `pixels[0]` and `values[1]` to `pixels[1]`; an empty span of values sits in the middle of the pixels. */
export function linearScale(values: Span, pixels: Span): LinearScale {
  const width = values[1] - values[0]
  if (width === 0) {
    const middle = (pixels[0] + pixels[1]) / 2
    return { pixel: () => middle, value: () => values[0] }
  }
  const slope = (pixels[1] - pixels[0]) / width
  return {
    pixel: value => pixels[0] + (value - values[0]) * slope,
    value: pixel => values[0] + (pixel - pixels[0]) / slope,
  }
}

/** The step of 1, 2 or 5 times a power of ten that divides a span into at most `most` parts. */
export function niceStep(span: number, most: number): number {
  if (!(span > 0)) return 1
  const power = 10 ** Math.floor(Math.log10(span / most))
  const factor = [1, 2, 5, 10].find(candidate => span / (candidate * power) <= most) ?? 10
  return factor * power
}

/** Round values from low to high, ends included where they are round themselves. */
export function ticks([low, high]: Span, most: number): number[] {
  const step = niceStep(high - low, most)
  const first = Math.ceil(low / step - 1e-9)
  const last = Math.floor(high / step + 1e-9)
  // A multiple of the step, not a running sum: rounding must not pile up along the axis. Adding 0 turns −0 into 0.
  return Array.from({ length: last - first + 1 }, (_, index) => Number(((first + index) * step).toPrecision(12)) + 0)
}

/** Widens a span to the next ticks on both sides. */
export function niceSpan([low, high]: Span, most: number): Span {
  const step = niceStep(high - low, most)
  return [Math.floor(low / step + 1e-9) * step, Math.ceil(high / step - 1e-9) * step]
}

/** Numbers of an axis, all to the same decimals; zero stays bare. */
export function tickLabels(values: readonly number[]): string[] {
  const decimals = Math.max(0, ...values.map(value => String(value).split('.')[1]?.length ?? 0))
  return values.map(value => value === 0 ? '0' : value.toFixed(decimals).replace('-', '−'))
}
