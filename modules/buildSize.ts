import { readFile } from 'node:fs/promises'
import { basename, join } from 'node:path'
import { brotliCompressSync, gzipSync } from 'node:zlib'
import { defineNuxtModule } from '@nuxt/kit'

/** One file of the client as the build's manifest names it. */
interface ManifestEntry {
  file: string
  src?: string
  name?: string
  isEntry?: boolean
  imports?: string[]
}
type Manifest = Record<string, ManifestEntry>

interface Size { gzip: number, brotli: number }

/** What the front page may weigh, compressed [kB]; the chart comes after it. */
const limits = { page: 250, chart: 150 } as const
const frontPage = ['pages/index.vue', 'layouts/public.vue']
const chart = 'components/chart/FitChart.client.vue'

/** The files a browser needs for these entries, each once. */
function closure(manifest: Manifest, keys: readonly string[], seen = new Set<string>()): Set<string> {
  for (const key of keys) {
    const entry = manifest[key]
    if (!entry || seen.has(key)) continue
    seen.add(key)
    closure(manifest, entry.imports ?? [], seen)
  }
  return seen
}

/** Chunks of these sources; one that several others share has lost its source and goes by the file's name. */
function keysOf(manifest: Manifest, sources: readonly string[]): string[] {
  return sources.map((source) => {
    const found = Object.entries(manifest).find(([key, { src, name }]) => (src ?? key).endsWith(source) || (!src && name === basename(source, '.vue')))
    if (!found) throw new Error(`build-size: no chunk of ${source} in the manifest; the front page was taken apart, name its files anew.`)
    return found[0]
  })
}

async function sizeOf(files: readonly string[]): Promise<Size> {
  const texts = await Promise.all(files.map(file => readFile(file)))
  return {
    gzip: texts.reduce((sum, text) => sum + gzipSync(text, { level: 9 }).length, 0) / 1000,
    brotli: texts.reduce((sum, text) => sum + brotliCompressSync(text).length, 0) / 1000,
  }
}

function line(name: string, { gzip, brotli }: Size, limit: number): string {
  return `${name}: ${brotli.toFixed(1)} kB brotli, ${gzip.toFixed(1)} kB gzip (at most ${limit})`
}

/** Prints after each build what the front page and the chart weigh, so that a growing bundle is seen when it grows. */
export default defineNuxtModule({
  meta: { name: 'build-size' },
  setup(_, nuxt) {
    let manifest: Manifest = {}
    nuxt.hook('build:manifest', (built) => {
      manifest = built as Manifest
    })
    nuxt.hook('nitro:init', nitro => void nitro.hooks.hook('compiled', async () => {
      if (Object.keys(manifest).length === 0) return
      const folder = join(nitro.options.output.publicDir, nuxt.options.app.buildAssetsDir)
      const scripts = (keys: Iterable<string>) => [...keys].map(key => manifest[key]?.file ?? '').filter(file => file.endsWith('.js')).map(file => join(folder, file))
      const entries = Object.keys(manifest).filter(key => manifest[key]?.isEntry)
      const page = closure(manifest, [...entries, ...keysOf(manifest, frontPage)])
      const chartOnly = [...closure(manifest, keysOf(manifest, [chart]))].filter(key => !page.has(key))
      console.log(line('front page, scripts', await sizeOf(scripts(page)), limits.page))
      console.log(line('chart, scripts', await sizeOf(scripts(chartOnly)), limits.chart))
    }))
  },
})
