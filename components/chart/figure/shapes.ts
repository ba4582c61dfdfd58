import type { FormulaPiece } from '#shared/science/chemistry/ions'

/** The few kinds of marks a figure is made of, in pixels, before any drawing library sees them. */
export interface PathShape {
  kind: 'path'
  d: string
  fill?: string
  stroke?: string
  width?: number
  dash?: number[]
  opacity?: number
}

export interface TextShape {
  kind: 'text'
  runs: FormulaPiece[]
  x: number
  y: number
  align: 'left' | 'center' | 'right'
  size: number
  fill: string
  weight?: number
  isItalic?: boolean
  isMono?: boolean
  /** paper colour drawn around the letters */
  halo?: string
}

export type Shape = PathShape | TextShape

export function line(x1: number, y1: number, x2: number, y2: number, stroke: string, width = 1, dash?: number[]): PathShape {
  return { kind: 'path', d: `M${x1.toFixed(1)} ${y1.toFixed(1)}L${x2.toFixed(1)} ${y2.toFixed(1)}`, stroke, width, dash }
}

export function polyline(points: readonly (readonly [number, number])[]): string {
  return points.map(([x, y], index) => `${index === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('')
}

export function circle(x: number, y: number, radius: number): string {
  return `M${(x - radius).toFixed(1)} ${y.toFixed(1)}a${radius} ${radius} 0 1 0 ${2 * radius} 0a${radius} ${radius} 0 1 0 ${-2 * radius} 0Z`
}

export function plainText(text: string): FormulaPiece[] {
  return [{ text }]
}
