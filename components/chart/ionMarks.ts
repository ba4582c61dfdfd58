/** How each anion is marked in every figure: one place for colour, shape and fill, in the order strongly → weakly hydrated. */

export const markShapes = ['square', 'diamond', 'triangle-up', 'triangle-down', 'circle', 'pentagon'] as const
export type MarkShape = typeof markShapes[number]
export type MarkFill = 'filled' | 'half' | 'open'

export interface IonMark {
  /** formula with charge, such as SO4^2- */
  ion: string
  /** CSS custom property that holds the colour in both themes */
  variable: string
  shape: MarkShape
  fill: MarkFill
}

export const ionMarks: readonly IonMark[] = [
  { ion: 'CO3^2-', variable: '--ion-co3', shape: 'square', fill: 'filled' },
  { ion: 'SO4^2-', variable: '--ion-so4', shape: 'diamond', fill: 'filled' },
  { ion: 'F^-', variable: '--ion-f', shape: 'triangle-up', fill: 'filled' },
  { ion: 'H2PO4^-', variable: '--ion-h2po4', shape: 'triangle-down', fill: 'filled' },
  { ion: 'Cl^-', variable: '--ion-cl', shape: 'circle', fill: 'half' },
  { ion: 'Br^-', variable: '--ion-br', shape: 'square', fill: 'half' },
  { ion: 'NO3^-', variable: '--ion-no3', shape: 'diamond', fill: 'half' },
  { ion: 'I^-', variable: '--ion-i', shape: 'circle', fill: 'open' },
  { ion: 'ClO4^-', variable: '--ion-clo4', shape: 'square', fill: 'open' },
  { ion: 'SCN^-', variable: '--ion-scn', shape: 'triangle-up', fill: 'open' },
]

const byIon = new Map(ionMarks.map(mark => [mark.ion, mark]))

/** The mark of an anion; one outside the table gets the shape no other uses, in a colour outside the ion scale. */
export function markOf(ion: string): IonMark {
  return byIon.get(ion) ?? { ion, variable: '--ink-2', shape: 'pentagon', fill: 'half' }
}

/** The colour as CSS takes it. */
export function colourOf(ion: string): string {
  return `var(${markOf(ion).variable})`
}

/** Half-widths that make all shapes look equally large, for a circle of radius 1. */
const reach: Record<MarkShape, number> = { 'square': 0.94, 'diamond': 1.18, 'triangle-up': 1.2, 'triangle-down': 1.2, 'circle': 1, 'pentagon': 1.12 }

type Corner = readonly [number, number]

function polygon(shape: Exclude<MarkShape, 'circle'>, radius: number): Corner[] {
  const r = reach[shape] * radius
  const side = r * Math.cos(Math.PI / 6)
  switch (shape) {
    case 'square': return [[-r, -r], [r, -r], [r, r], [-r, r]]
    case 'diamond': return [[0, -r], [r, 0], [0, r], [-r, 0]]
    case 'triangle-up': return [[0, -r], [side, r * 0.84], [-side, r * 0.84]]
    case 'triangle-down': return [[0, r], [side, -r * 0.84], [-side, -r * 0.84]]
    case 'pentagon': return [0, 1, 2, 3, 4].map(corner => [r * Math.sin(corner * 0.4 * Math.PI), -r * Math.cos(corner * 0.4 * Math.PI)])
  }
}

function closed(corners: readonly Corner[], x: number, y: number): string {
  return `M${corners.map(([dx, dy]) => `${(x + dx).toFixed(2)} ${(y + dy).toFixed(2)}`).join('L')}Z`
}

/**
 * Outline of a mark as an SVG path.
 *
 * @param x centre [px]
 * @param y centre [px]
 * @param radius radius of the circle of the same visual size [px]
 */
export function outlinePath(shape: MarkShape, x: number, y: number, radius: number): string {
  if (shape !== 'circle') return closed(polygon(shape, radius), x, y)
  const d = 2 * radius
  return `M${(x - radius).toFixed(2)} ${y.toFixed(2)}a${radius} ${radius} 0 1 0 ${d} 0a${radius} ${radius} 0 1 0 ${-d} 0Z`
}

/** The filled half of a half mark: the left of round and pointed shapes, the foot of a square. */
export function halfPath(shape: MarkShape, x: number, y: number, radius: number): string {
  const r = reach[shape] * radius
  if (shape === 'circle') return `M${x.toFixed(2)} ${(y - radius).toFixed(2)}a${radius} ${radius} 0 0 0 0 ${2 * radius}Z`
  if (shape === 'square') return closed([[-r, 0], [r, 0], [r, r], [-r, r]], x, y)
  if (shape === 'diamond') return closed([[0, -r], [0, r], [-r, 0]], x, y)
  return closed([[0, -r], ...polygon(shape, radius).filter(([dx]) => dx < -1e-9).reverse(), [0, shape === 'triangle-down' ? r : r * 0.84]], x, y)
}
