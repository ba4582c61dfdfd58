import type { EChartsCoreOption } from 'echarts/core'
import { axisNames, axisShapes } from './axes'
import { bandShapes, curveShapes, noSaltShapes, straightLineShapes } from './curves'
import { frameOf, type Frame } from './frame'
import { readingShapes, residualShapes } from './marks'
import { line, type PathShape, type Shape } from './shapes'
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
  if (!frame.hasResiduals) return []
  const { left, width } = frame.residual
  const { limit } = frame.residualAxis
  const rule = (value: number, dash?: number[]) => line(left, frame.r(value), left + width, frame.r(value), palette.rule, 1, dash)
  return [rule(0), rule(limit, [1.5, 3.5]), rule(-limit, [1.5, 3.5])]
}

/** Everything drawn, layer by layer, in pixels. */
export function figureLayers(content: FigureContent, frame: Frame, palette: Palette): Layer[] {
  const words = placeWords(content, frame, palette)
  return [
    { name: 'stipple', shapes: stippleShapes(content, frame, palette, words.boxes) },
    { name: 'no-salt line', shapes: noSaltShapes(content, frame, palette) },
    { name: 'axes', shapes: axisShapes(frame, palette) },
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

/**
 * The ECharts option for a figure of a given size. All marks are custom series in pixels, the axes too: the frame that
 * lays them out also places the read-out and the words, and the library's own axes would nearly double its weight.
 */
export function figureOption(content: FigureContent, width: number, height: number, palette: Palette): EChartsCoreOption {
  return {
    animation: false,
    series: figureLayers(content, frameOf(content, width, height), palette).map(({ name, shapes }, index) => ({
      type: 'custom', id: name, name, coordinateSystem: 'none', silent: true, z: index + 2, data: [0],
      // Children are replaced, not merged: a mark of the table before must not stay or bend into another.
      renderItem: () => ({ type: 'group', $mergeChildren: false, children: shapes.map(toElement) }),
    })),
  }
}
