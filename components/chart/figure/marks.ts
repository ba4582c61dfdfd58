import { halfPath, markOf, outlinePath } from '~~/components/chart/ionMarks'
import { residualsOf, type Frame } from './frame'
import { fixed } from '#shared/science/notation'
import { circle, line, plainText, type Shape } from './shapes'
import type { FigureContent, FigureReading, Palette } from './types'

const markRadius = 4.5

function ring(x: number, y: number, radius: number, palette: Palette): Shape {
  return { kind: 'path', d: circle(x, y, radius), fill: palette.paper, stroke: palette.ink2, width: 1.3 }
}

/** Set aside, but still there: a grey ring with a slash. */
function slashedRing(x: number, y: number, palette: Palette): Shape[] {
  return [ring(x, y, 4, palette), line(x - 5, y + 5, x + 5, y - 5, palette.ink2, 1.3)]
}

/** A letter in a circle that ties a place to a margin note. */
function keyShapes(letter: string, x: number, y: number, palette: Palette): Shape[] {
  return [
    { kind: 'path', d: circle(x, y, 8), fill: palette.paper, stroke: palette.ink, width: 1 },
    { kind: 'text', runs: plainText(letter), x, y, align: 'center', size: 11, weight: 600, fill: palette.ink },
  ]
}

/** The mark of the anion with a halo of paper, so that neighbours stay apart. */
export function ionMarkShapes(ion: string | null, x: number, y: number, radius: number, palette: Palette): Shape[] {
  const { shape, fill } = markOf(ion ?? '')
  const outline = outlinePath(shape, x, y, radius)
  const isFilled = fill === 'filled'
  const half: Shape[] = fill === 'half' ? [{ kind: 'path', d: halfPath(shape, x, y, radius), fill: palette.front }] : []
  return [
    { kind: 'path', d: outline, fill: palette.paper, stroke: palette.paper, width: 3.2 },
    { kind: 'path', d: outline, fill: isFilled ? palette.front : palette.paper, stroke: palette.front, width: isFilled ? 0.8 : 1.4 },
    ...half,
  ]
}

/** A reading that only bounds the cloud point: a bar with an arrow towards where it must lie. */
function limitShapes(reading: FigureReading, x: number, y: number, palette: Palette): Shape[] {
  const way = reading.limit === 'below' ? 1 : -1
  const tip = y + way * 16
  return [
    line(x - 5, y, x + 5, y, palette.front, 1.6),
    { kind: 'path', d: `M${x} ${y}V${tip}M${x - 3.5} ${tip - way * 4.5}L${x} ${tip}L${x + 3.5} ${tip - way * 4.5}`, stroke: palette.front, width: 1.4 },
  ]
}

/** Blanks are grey rings, all others carry the mark of the anion. */
function usedMark(reading: FigureReading, ion: string | null, x: number, y: number, radius: number, palette: Palette): Shape[] {
  const isBlank = reading.blank || reading.x === 0
  if (reading.apart && !isBlank) return ionMarkShapes(ion, x, y, radius, { ...palette, front: palette.rule })
  return isBlank ? [ring(x, y, radius * 0.75, palette)] : ionMarkShapes(ion, x, y, radius, palette)
}

/** All readings of the main plot; those set aside first, so that none hides a reading in use. */
export function readingShapes(content: FigureContent, frame: Frame, palette: Palette): Shape[] {
  const order = [...content.readings].sort((a, b) => Number(b.setAside ?? false) - Number(a.setAside ?? false))
  return order.flatMap((reading) => {
    const [x, y] = [frame.x(reading.x), frame.y(reading.y)]
    const key = reading.key ? keyShapes(reading.key, x + 15, y, palette) : []
    if (reading.setAside) return [...slashedRing(x, y, palette), ...key]
    if ((reading.limit ?? 'exact') !== 'exact') return [...limitShapes(reading, x, y, palette), ...key]
    return [...usedMark(reading, content.ion, x, y, markRadius, palette), ...key]
  })
}

/** Residuals on their own axis; one beyond it stands at the edge with its value and an arrow. */
export function residualShapes(content: FigureContent, frame: Frame, palette: Palette): Shape[] {
  const { max, decimals } = frame.residualAxis
  return residualsOf(content).flatMap(({ reading, residual }) => {
    const x = frame.x(reading.x)
    const isOff = Math.abs(residual) > max
    const y = frame.r(isOff ? Math.sign(residual) * max * 0.72 : residual)
    const mark = reading.setAside ? slashedRing(x, y, palette) : usedMark(reading, content.ion, x, y, 3.4, palette)
    if (!isOff) return mark
    const value = `${residual > 0 ? '+' : ''}${fixed(residual, Math.max(decimals, 2))} K ${residual > 0 ? '↑' : '↓'}`
    const goesRight = x + 90 < frame.width
    return [...mark, {
      kind: 'text', runs: plainText(value), x: goesRight ? x + 9 : x - 9, y, align: goesRight ? 'left' : 'right', size: 12, fill: palette.ink2, halo: palette.paper,
    }]
  })
}
