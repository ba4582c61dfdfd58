import { outlinePath } from '~~/components/chart/ionMarks'
import { polyline } from '~~/components/chart/figure/shapes'
import { dotsPath, stipple } from '~~/components/chart/figure/stipple'
import { textBox } from '~~/components/chart/figure/text'
import { examples } from '~~/composables/sheet/examples'

/** The picture at the head of the page for one width: the thiocyanate example, bled to the edges. */
export interface HeroPicture {
  width: number
  height: number
  layers: { diameter: number, path: string }[]
  band: string
  curve: string
  marks: string[]
  words: { text: string, x: number, y: number }[]
}

/** What the example was drawn from; invented. */
const constants = { T0: 31.01, c: -3.93, Bmax: 3.72, K: 5 } as const
const rightEnd = 1.02
const bandHalfWidth = 0.16

/** Kelvins from the curve's start to the top and over the whole height of the picture. */
const kelvinsToTop = 2.39
const kelvinsHigh = 4

function cloudPoint(x: number): number {
  const { T0, c, Bmax, K } = constants
  return T0 + c * x + Bmax * K * x / (1 + K * x)
}

/** Sizes that follow the picture's height; small screens have a finer stipple. */
function sizes(height: number) {
  const isSmall = height < 200
  return { pitch: isSmall ? 7 : 9, radius: isSmall ? 1.75 : 2.35, reach: height * 0.56, mark: isSmall ? 3.95 : 5.4 }
}

/** Draws the head's picture for a width and height [px]. */
export function heroPicture(width: number, height: number): HeroPicture {
  const perKelvin = height / kelvinsHigh
  const column = (x: number) => x / rightEnd * width
  const row = (temperature: number) => (kelvinsToTop - (temperature - constants.T0)) * perKelvin
  const at = (shift: number) => Array.from({ length: 161 }, (_, index) => {
    const x = rightEnd * index / 160
    return [column(x), row(cloudPoint(x) + shift)] as const
  })
  const { pitch, radius, reach, mark } = sizes(height)
  const words = height < 200
    ? []
    : [
        { text: 'cloudy', x: width * 0.8, y: row(cloudPoint(0.8)) - height * 0.22 },
        { text: 'clear', x: width * 0.785, y: row(cloudPoint(0.8)) + height * 0.22 },
      ]
  const dots = stipple({
    area: { left: -2, top: -2, right: width, bottom: height }, side: 'above', pitch, radius, reach,
    curve: pixel => row(cloudPoint(pixel / width * rightEnd)),
    boxes: words.map(({ text, x, y }) => textBox(text, x, y - 6, 17, 'center')),
  })
  return {
    width, height, words,
    layers: dots.map(layer => ({ diameter: Number((2 * layer.radius).toFixed(1)), path: dotsPath(layer.dots) })),
    band: `${polyline([...at(bandHalfWidth), ...at(-bandHalfWidth).reverse()])}Z`,
    curve: polyline(at(0)),
    marks: examples[0].rows.map(([x, y]) => [Number(x), Number(y)] as const).filter(([x]) => x > 0)
      .map(([x, y]) => outlinePath('triangle-up', column(x), row(y), mark)),
  }
}
