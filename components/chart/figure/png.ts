import { init, use, type EChartsCoreOption } from 'echarts/core'
import { CanvasRenderer } from 'echarts/renderers'

const pixelRatio = 3

/** Draws the figure once more on a canvas and takes it as a PNG; loaded only when somebody asks for one. */
export async function pngOf(option: EChartsCoreOption, width: number, height: number, paper: string): Promise<Blob> {
  use([CanvasRenderer])
  const chart = init(document.createElement('div'), null, { renderer: 'canvas', width, height, devicePixelRatio: pixelRatio })
  try {
    chart.setOption(option)
    const address = chart.getDataURL({ type: 'png', pixelRatio, backgroundColor: paper })
    const bytes = Uint8Array.from(atob(address.slice(address.indexOf(',') + 1)), letter => letter.charCodeAt(0))
    return new Blob([bytes], { type: 'image/png' })
  }
  finally {
    chart.dispose()
  }
}
