import { describe, expect, it } from 'vitest'
import { importedPath, importsOf, projectFiles, textOf } from './sources'

/** Which rooms each room may import from; what a room does not name it may not enter. */
const arrows: Record<string, readonly string[]> = {
  'pages': ['components', 'composables', 'stores', 'shared/contracts', 'shared/science', 'shared/tables'],
  'layouts': ['components', 'composables', 'stores', 'shared/contracts', 'shared/science', 'shared/tables'],
  'middleware': ['composables', 'stores', 'shared/contracts'],
  'plugins': ['composables', 'stores', 'shared/contracts'],
  'components': ['components', 'composables', 'stores', 'shared/contracts', 'shared/science', 'shared/tables'],
  'composables': ['composables', 'stores', 'shared/contracts', 'shared/science', 'shared/tables'],
  'stores': ['stores', 'shared/contracts', 'shared/science', 'shared/tables'],
  'shared/science': ['shared/science'],
  'shared/contracts': ['shared/contracts', 'shared/science', 'shared/tables'],
  'server/api': ['server/services', 'server/utils', 'shared/contracts', 'shared/science', 'shared/tables'],
  'server/plugins': ['server/services', 'server/utils', 'server/jobs', 'server/database', 'shared/contracts', 'shared/science', 'shared/tables'],
  'server/middleware': ['server/services', 'server/utils', 'shared/contracts'],
  'server/utils': ['server/services', 'server/utils', 'server/database', 'server/jobs', 'shared/contracts', 'shared/science', 'shared/tables'],
  'server/services': ['server/services', 'server/utils', 'server/database', 'server/jobs', 'server/workers', 'shared/contracts', 'shared/science', 'shared/tables'],
  'server/jobs': ['server/jobs', 'server/services', 'server/utils', 'server/database', 'shared/contracts', 'shared/science', 'shared/tables'],
  'server/workers': ['server/workers', 'shared/contracts', 'shared/science', 'shared/tables'],
  'server/database': ['server/database', 'server/jobs', 'server/services', 'data-seeds', 'shared/contracts', 'shared/science', 'shared/tables'],
}

/** Packages by which the science would reach out of pure numbers. */
const sciencePackages = ['mathjs', 'mathjs/number', 'ml-levenberg-marquardt', 'ml-matrix']

/** A long name wins over a short one that begins it. */
const rooms = Object.keys(arrows).sort((a, b) => b.length - a.length)
const inRoom = (room: string) => (path: string) => path === room || path.startsWith(`${room}/`)
const roomOf = (path: string) => rooms.find(room => inRoom(room)(path))

const sources = projectFiles().filter(file => /\.(ts|vue|mjs)$/.test(file) && roomOf(file))

describe('the arrows between folders', () => {
  it('see the files they watch over', () => {
    expect(sources.length).toBeGreaterThan(20)
  })

  it.each(rooms.filter(room => sources.some(inRoom(room))))('run one way out of %s', (room) => {
    const broken = sources.filter(file => roomOf(file) === room).flatMap(file => importsOf(textOf(file))
      .map(specifier => importedPath(file, specifier))
      .filter((path): path is string => path !== null && !inRoom(room)(path) && !arrows[room]?.some(allowed => inRoom(allowed)(path)))
      .map(path => `${file} → ${path}`))
    expect(broken).toEqual([])
  })

  it('lead from shared/science to numeric packages alone', () => {
    const strangers = sources.filter(inRoom('shared/science')).flatMap(file => importsOf(textOf(file))
      .filter(specifier => importedPath(file, specifier) === null && !sciencePackages.includes(specifier))
      .map(specifier => `${file} → ${specifier}`))
    expect(strangers).toEqual([])
  })

  it('never lead from shared/contracts to a package other than zod', () => {
    const strangers = sources.filter(inRoom('shared/contracts')).flatMap(file => importsOf(textOf(file))
      .filter(specifier => importedPath(file, specifier) === null && specifier !== 'zod')
      .map(specifier => `${file} → ${specifier}`))
    expect(strangers).toEqual([])
  })
})

describe('importsOf', () => {
  it('finds every form of an import', () => {
    const source = `import a from './a'\nimport { b,\n  c } from "~~/b"\nimport './c.css'\nexport * from '#shared/d'\nconst e = await import('./e')\nimport type { F } from './f'`
    expect(importsOf(source).sort()).toEqual(['#shared/d', './a', './c.css', './e', './f', '~~/b'])
  })
})
