import type { EChartsCoreOption } from 'echarts/core'
import { fixed } from '#shared/science/notation'
import type { Axis } from './axis'
import { bandShapes, curveShapes, noSaltShapes, straightLineShapes } from './curves'
import { frameOf, type Frame, type Rectangle } from './frame'
import { readingShapes, residualShapes } from './marks'
import { line, plainText, type PathShape, type Shape } from './shapes'
import { dotsPath, stipple } from './stipple'
import { toElement } from './elements'
import type { FigureContent, Palette } from './types'
import { curveHeight, placeWords } from './words'

/** A layer of the figure, in drawing order. */
export interface Layer {
  name: string
  shapes: Shape[]
}

function stippleShapes(content: FigureContent, frame: Frame, palette: Palette, boxes: Parameters<typeof stipple>[0]['boxes']): PathShape[] {
  const curve = curveHeight(content, frame)
  if (!curve) return []
  const { left, top, width, height } = frame.main
  const layers = stipple({
    area: { left, top, right: left + width, bottom: top + height }, curve, boxes,
    side: content.clouds === 'on-heating' ? 'above' : 'below',
  })
  return layers.map(({ radius, dots }) => ({ kind: 'path', d: dotsPath(dots), stroke: palette.haze, width: radius * 2, opacity: palette.hazeOpacity }))
}

function residualRules(frame: Frame, palette: Palette): Shape[] {
  const { left, width } = frame.residual
  const { limit } = frame.residualAxis
  const rule = (value: number, dash?: number[]) => line(left, frame.r(value), left + width, frame.r(value), palette.rule, 1, dash)
  return [rule(0), rule(limit, [1.5, 3.5]), rule(-limit, [1.5, 3.5])]
}

/** Names of the axes stand above and at the right end, horizontal, quantity in italics over its unit. */
function axisNames(frame: Frame, palette: Palette): Shape[] {
  const right = frame.main.left + frame.main.width
  const foot = frame.residual.top + frame.residual.height
  const common = { kind: 'text', size: 12.5, fill: palette.ink } as const
  return [
    { ...common, runs: [{ text: 'T' }], x: 0, y: 10, align: 'left', isItalic: true },
    { ...common, runs: [{ text: 'cp', place: 'sub' }, { text: ' / °C' }], x: 8, y: 10, align: 'left' },
    { ...common, runs: [{ text: 'salt concentration [M] / mol L' }, { text: '−1', place: 'sup' }], x: right, y: foot + 33, align: 'right' },
    { ...common, runs: plainText('residual / K'), size: 12, fill: palette.ink2, x: right, y: frame.residual.top - 4, align: 'right', halo: palette.paper },
  ]
}

/** Everything drawn, layer by layer, in pixels. */
export function figureLayers(content: FigureContent, frame: Frame, palette: Palette): Layer[] {
  const words = placeWords(content, frame, palette)
  return [
    { name: 'stipple', shapes: stippleShapes(content, frame, palette, words.boxes) },
    { name: 'no-salt line', shapes: noSaltShapes(content, frame, palette) },
    { name: 'band', shapes: bandShapes(content, frame, palette) },
    { name: 'straight line', shapes: straightLineShapes(content, frame, palette) },
    { name: 'curve', shapes: curveShapes(content, frame, palette) },
    { name: 'residual rules', shapes: residualRules(frame, palette) },
    { name: 'residuals', shapes: residualShapes(content, frame, palette) },
    { name: 'words', shapes: words.shapes },
    { name: 'readings', shapes: readingShapes(content, frame, palette) },
    { name: 'axis names', shapes: axisNames(frame, palette) },
  ]
}

function gridOf({ left, top, width, height }: Rectangle) {
  return { left, top, width, height, outerBoundsMode: 'none' as const }
}

function axisOption(axis: Axis, gridIndex: number, palette: Palette, tick: number, isLabelled = true) {
  const values = isLabelled ? axis.ticks : []
  return {
    type: 'value' as const, gridIndex, min: axis.min, max: axis.max,
    splitLine: { show: false },
    axisLine: { show: true, onZero: false, lineStyle: { color: palette.rule, width: 1 } },
    axisTick: { show: isLabelled, length: tick, lineStyle: { color: palette.rule }, customValues: values },
    axisLabel: {
      show: isLabelled, customValues: values, color: palette.ink2, fontSize: 12, fontFamily: 'IBM Plex Sans', margin: tick + 4, hideOverlap: false,
      formatter: (value: number) => fixed(value, axis.decimals),
    },
  }
}

/** The ECharts option for a figure of a given size: two grids on one concentration axis, all marks as custom series. */
export function figureOption(content: FigureContent, width: number, height: number, palette: Palette): EChartsCoreOption {
  const frame = frameOf(content, width, height)
  return {
    animation: false,
    grid: [gridOf(frame.main), gridOf(frame.residual)],
    xAxis: [axisOption(frame.xAxis, 0, palette, 5, false), axisOption(frame.xAxis, 1, palette, 5)],
    yAxis: [axisOption(frame.yAxis, 0, palette, 4), axisOption(frame.residualAxis, 1, palette, 4)],
    series: figureLayers(content, frame, palette).map(({ name, shapes }, index) => ({
      type: 'custom', id: name, name, silent: true, clip: false, z: index + 2, data: [0],
      renderItem: () => ({ type: 'group', children: shapes.map(toElement) }),
    })),
  }
}
