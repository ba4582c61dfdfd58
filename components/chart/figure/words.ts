import { formulaPieces } from '#shared/science/chemistry/ions'
import { sampleAt, type Frame } from './frame'
import { circle, line, plainText, type Shape, type TextShape } from './shapes'
import { overlap, textBox, textWidth } from './text'
import type { Box, FigureContent, Palette } from './types'

/** Words in the figure with the boxes they cover, for the stipple to part around. */
export interface PlacedWords {
  shapes: Shape[]
  boxes: Box[]
}

type CurveHeight = (x: number) => number

const none: PlacedWords = { shapes: [], boxes: [] }
const phaseSize = 13
const noteSize = 12

/** The curve as a height in pixels over pixel columns. */
export function curveHeight(content: FigureContent, frame: Frame): CurveHeight | null {
  const { curve } = content
  if (!curve) return null
  const [first = 0] = curve.x
  const scale = (frame.xAxis.max - frame.xAxis.min) / frame.main.width
  return column => frame.y(sampleAt(curve, curve.y, Math.max(first, frame.xAxis.min + (column - frame.main.left) * scale)))
}

/** The ion's formula at the right end of its curve. */
function endLabel(content: FigureContent, frame: Frame, palette: Palette): PlacedWords {
  const { curve, ion } = content
  const end = curve?.y.at(-1)
  if (end === undefined || !ion || content.isSketch) return none
  const x = frame.main.left + frame.main.width + 10
  const y = frame.y(end)
  const runs = formulaPieces(ion)
  const text = runs.map(run => run.text).join('')
  return {
    shapes: [{ kind: 'text', runs, x, y, align: 'left', size: 13.5, weight: 500, fill: palette.front }],
    boxes: [textBox(text, x, y, 13.5, 'left')],
  }
}

/** Elbow leader from the turning point to one line of text, on the side away from the curve's bulk. */
function turningPointLabel(content: FigureContent, frame: Frame, palette: Palette): PlacedWords {
  const { curve, turningPoint } = content
  if (!curve || !turningPoint || turningPoint.x > frame.xAxis.max) return none
  const x = frame.x(turningPoint.x)
  const y = frame.y(sampleAt(curve, curve.y, turningPoint.x))
  const isPeak = sampleAt(curve, curve.y, turningPoint.x) >= (curve.y[0] ?? 0)
  const elbow = isPeak ? Math.max(y - 46, frame.main.top + 8) : Math.min(y + 46, frame.main.top + frame.main.height - 10)
  const place = besideLeader(turningPoint.text, x, elbow, frame.width)
  return {
    shapes: [
      { kind: 'path', d: `M${x} ${y}V${elbow}${place.isBeside ? 'h14' : ''}`, stroke: palette.ink, width: 1 },
      { kind: 'path', d: circle(x, y, 2.2), fill: palette.ink },
      { kind: 'text', runs: plainText(turningPoint.text), x: place.x, y: place.y, align: 'left', size: noteSize, fill: palette.ink, halo: palette.paper },
    ],
    boxes: [textBox(turningPoint.text, place.x, place.y, noteSize, 'left')],
  }
}

/** Right of the leader's end where there is room, else above it and inside the figure. */
function besideLeader(text: string, x: number, y: number, width: number) {
  const right = width - textWidth(text, noteSize)
  return x + 19 <= right ? { x: x + 19, y, isBeside: true } : { x: Math.max(0, Math.min(x - 20, right)), y: y - 9, isBeside: false }
}

/** Where a word of the two phases may stand, best first: parts of the plot's width, and pixels from the curve. */
const phasePlaces = {
  cloudy: { parts: [0.7, 0.82, 0.55, 0.3, 0.9], aways: [52, 34] },
  clear: { parts: [0.32, 0.5, 0.2, 0.7], aways: [90, 120, 60, 36] },
} as const

function phaseWord(word: 'cloudy' | 'clear', frame: Frame, curve: CurveHeight, isAbove: boolean, taken: readonly Box[], palette: Palette): PlacedWords {
  const { main } = frame
  const { parts, aways } = phasePlaces[word]
  for (const [part, wanted] of parts.flatMap(part => aways.map(away => [part, away] as const))) {
    const x = main.left + part * main.width
    const edge = isAbove ? main.top : main.top + main.height
    const away = Math.min(wanted, Math.abs(curve(x) - edge) - 12)
    const y = curve(x) + (isAbove ? -away : away)
    const box = textBox(word, x, y, phaseSize, 'center')
    if (away < 26 || taken.some(other => overlap(box, other))) continue
    const shape: TextShape = { kind: 'text', runs: plainText(word), x, y, align: 'center', size: phaseSize, fill: palette.ink2, isItalic: true }
    return { shapes: [shape], boxes: [box] }
  }
  return none
}

/** A short crimson mark on the axis for each row that cannot be drawn. */
function gapMarks(content: FigureContent, frame: Frame, palette: Palette): PlacedWords {
  const foot = frame.main.top + frame.main.height
  const marks = content.gaps.map(({ x, text }) => {
    const column = frame.x(x)
    const align = column > frame.main.left + textWidth(text, noteSize) + 12 ? 'right' as const : 'left' as const
    const textX = column + (align === 'right' ? -6 : 6)
    const word: TextShape = { kind: 'text', runs: plainText(text), x: textX, y: foot - 13, align, size: noteSize, fill: palette.error, halo: palette.paper }
    return { shapes: [line(column, foot - 7, column, foot + 7, palette.error, 1.6), word], box: textBox(text, textX, foot - 13, noteSize, align) }
  })
  return { shapes: marks.flatMap(mark => mark.shapes), boxes: marks.map(mark => mark.box) }
}

/** The no-salt line crosses the plot; words keep off it, dots do not. */
function noSaltBox({ curve, isSketch }: FigureContent, { main, y }: Frame): Box[] {
  const start = curve?.x[0] === 0 && !isSketch ? curve.y[0] : undefined
  return start === undefined ? [] : [{ left: main.left, right: main.left + main.width, top: y(start) - 2, bottom: y(start) + 2 }]
}

/** All words of the main plot, placed so that none covers another. */
export function placeWords(content: FigureContent, frame: Frame, palette: Palette): PlacedWords {
  const fixed = [endLabel, turningPointLabel, gapMarks].map(place => place(content, frame, palette))
  const curve = curveHeight(content, frame)
  const taken = [...fixed.flatMap(words => words.boxes), ...noSaltBox(content, frame)]
  if (!curve) return { shapes: fixed.flatMap(words => words.shapes), boxes: fixed.flatMap(words => words.boxes) }
  const isCloudyAbove = content.clouds === 'on-heating'
  const cloudy = phaseWord('cloudy', frame, curve, isCloudyAbove, taken, palette)
  const clear = phaseWord('clear', frame, curve, !isCloudyAbove, taken, palette)
  const all = [...fixed, cloudy, clear]
  return { shapes: all.flatMap(words => words.shapes), boxes: all.flatMap(words => words.boxes) }
}
