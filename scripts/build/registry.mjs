import { readdirSync } from 'node:fs'
import { join } from 'node:path'

/** Files that answer what no declared route does; they describe no operation of their own. */
const fallback = '[...].ts'

/**
 * Method and path of every file under server/api, read off the file tree.
 * @param {string} folder
 */
export function routesIn(folder) {
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter(entry => entry.isFile() && entry.name.endsWith('.ts') && entry.name !== fallback)
    .map(entry => join(entry.parentPath, entry.name))
    .sort()
    .map((file) => {
      const [, stem, method] = /^(.*)\.(get|post|put|patch|delete)\.ts$/.exec(file.slice(folder.length)) ?? []
      if (!stem || !method) throw new Error(`${file}: a route's file ends in .get.ts, .post.ts, .put.ts, .patch.ts or .delete.ts`)
      const path = `/api${stem.replaceAll('\\', '/').replace(/\/index$/, '').replace(/\[(\w+)\]/g, '{$1}')}`
      return { file, method, path }
    })
}

/**
 * The virtual module `#routes`: every route of ours with its handler, and the names of those that libraries bring.
 * @param {import('nitropack').Nitro} nitro
 */
export function registerRoutes(nitro) {
  const folder = join(nitro.options.rootDir, 'server/api')
  nitro.options.virtual['#routes'] = () => {
    const ours = routesIn(folder).map(({ file, method, path }) =>
      `  { method: '${method}', path: '${path}', load: () => import(${JSON.stringify(file)}).then(module => module.default) },`)
    const libraries = nitro.options.handlers.filter(({ route }) => route?.startsWith('/api/'))
      .map(({ method, route }) => `${(method ?? 'all').toLowerCase()} ${route}`).sort()
    return `export const routes = [\n${ours.join('\n')}\n]\nexport const libraryRoutes = ${JSON.stringify([...new Set(libraries)])}\n`
  }
}
