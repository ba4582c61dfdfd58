import { fixed } from '#shared/science/notation'
import type { Axis } from './axis'
import type { Frame, Rectangle } from './frame'
import { line, plainText, type Shape } from './shapes'
import type { Palette } from './types'

const tickLength = { major: 5, minor: 3 } as const
const labelSize = 12

/** The middle of the nearest pixel, so that a hairline is one pixel wide. */
function snap(place: number): number {
  return Math.round(place - 0.5) + 0.5
}

function hairlines({ left, top, width, height }: Rectangle, palette: Palette): Shape[] {
  const [x, foot] = [snap(left), snap(top + height)]
  return [line(x, top, x, foot, palette.rule), line(x, foot, left + width, foot, palette.rule)]
}

function verticalTicks(axis: Axis, { left }: Rectangle, place: (value: number) => number, palette: Palette): Shape[] {
  return axis.ticks.flatMap((value): Shape[] => {
    const y = snap(place(value))
    return [
      line(left - tickLength.major + 1, y, left, y, palette.rule),
      { kind: 'text', runs: plainText(fixed(value, axis.decimals)), x: left - 9, y, align: 'right', size: labelSize, fill: palette.ink2 },
    ]
  })
}

/** Short ticks stand half-way between long ones, as far as the axis goes. */
function halfway({ min, max, ticks }: Axis): number[] {
  const step = (ticks[1] ?? max) - (ticks[0] ?? min)
  return ticks.map(tick => tick + step / 2).filter(value => value < max)
}

function concentrationTicks(frame: Frame, palette: Palette): Shape[] {
  const { xAxis, residual } = frame
  const foot = residual.top + residual.height
  const tick = (value: number, length: number) => line(snap(frame.x(value)), foot, snap(frame.x(value)), foot + length, palette.rule)
  return [
    ...halfway(xAxis).map(value => tick(value, tickLength.minor)),
    ...xAxis.ticks.flatMap((value): Shape[] => [
      tick(value, tickLength.major),
      { kind: 'text', runs: plainText(fixed(value, xAxis.decimals)), x: frame.x(value), y: foot + 14, align: 'center', size: labelSize, fill: palette.ink2 },
    ]),
  ]
}

/** Left and bottom hairlines with ticks outside; no grid. The concentration is told once, under the lower plot. */
export function axisShapes(frame: Frame, palette: Palette): Shape[] {
  return [
    ...hairlines(frame.main, palette),
    ...verticalTicks(frame.yAxis, frame.main, frame.y, palette),
    ...(frame.hasResiduals ? [...hairlines(frame.residual, palette), ...verticalTicks(frame.residualAxis, frame.residual, frame.r, palette)] : []),
    ...concentrationTicks(frame, palette),
  ]
}

/** Names of the axes stand above and at the right end, horizontal, quantity in italics over its unit. */
export function axisNames(frame: Frame, palette: Palette): Shape[] {
  const residualName: Shape = { kind: 'text', runs: plainText('residual / K'), size: 12, fill: palette.ink2, x: frame.main.left + frame.main.width, y: frame.residual.top - 4, align: 'right', halo: palette.paper }
  const right = frame.main.left + frame.main.width
  const foot = frame.residual.top + frame.residual.height
  const common = { kind: 'text', size: 12.5, fill: palette.ink } as const
  return [
    { ...common, runs: plainText('T'), x: 0, y: 10, align: 'left', isItalic: true },
    { ...common, runs: [{ text: 'cp', place: 'sub' }, { text: ' / °C' }], x: 8, y: 10, align: 'left' },
    { ...common, runs: [{ text: 'salt concentration [M] / mol L' }, { text: '−1', place: 'sup' }], x: right, y: foot + 33, align: 'right' },
    ...(frame.hasResiduals ? [residualName] : []),
  ]
}
