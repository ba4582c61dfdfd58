import type { FormulaPiece } from '#shared/science/chemistry/ions'
import type { Shape, TextShape } from './shapes'

const families = { sans: '\'IBM Plex Sans\', system-ui, sans-serif', mono: '\'IBM Plex Mono\', ui-monospace, monospace' } as const

/** Sub- and superscripts as rich text: 72 % of the size, moved by padding since rich text knows no baseline shift. */
const smaller = 0.72
const shift = { sub: 0.68, sup: 0.68 } as const

function markup({ text, place }: FormulaPiece): string {
  return place ? `{${place}|${text}}` : text
}

function font(shape: TextShape, size: number): string {
  const family = shape.isMono ? families.mono : families.sans
  return `${shape.isItalic ? 'italic ' : ''}${shape.weight ?? 400} ${size}px ${family}`
}

function textElement(shape: TextShape) {
  const small = { font: font(shape, shape.size * smaller), fill: shape.fill }
  return {
    type: 'text' as const,
    style: {
      text: shape.runs.map(markup).join(''), x: shape.x, y: shape.y,
      textAlign: shape.align, textVerticalAlign: 'middle' as const,
      font: font(shape, shape.size), fill: shape.fill,
      ...(shape.halo && { stroke: shape.halo, lineWidth: 4 }),
      rich: {
        sub: { ...small, padding: [shape.size * shift.sub, 0, 0, 0] },
        sup: { ...small, padding: [0, 0, shape.size * shift.sup, 0] },
      },
    },
  }
}

/** A mark as the drawing library's element. */
export function toElement(shape: Shape) {
  if (shape.kind === 'text') return textElement(shape)
  return {
    type: 'path' as const,
    shape: { pathData: shape.d },
    style: {
      fill: shape.fill ?? 'none', stroke: shape.stroke ?? 'none', lineWidth: shape.width ?? 0,
      lineDash: shape.dash, opacity: shape.opacity ?? 1, lineCap: 'round' as const, lineJoin: 'round' as const,
    },
  }
}
