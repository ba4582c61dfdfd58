import { execFileSync } from 'node:child_process'
import { readFileSync, readdirSync } from 'node:fs'
import { join, relative } from 'node:path'
import { aliases } from '../../../aliases'

export const root = aliases['~~']

const notOurs = new Set(['node_modules', '.git', '.nuxt', '.output', 'coverage', 'test-results'])

/** Every file of the project by its path from the root; the list of git where there is one. */
export function projectFiles(): string[] {
  try {
    const listed = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard', '-z'], { cwd: root, encoding: 'utf8', stdio: 'pipe' })
    return listed.split('\0').filter(file => file && isPresent(file))
  }
  catch {
    return walk(root)
  }
}

/** Text of a file named by its path from the root. */
export const textOf = (file: string): string => readFileSync(join(root, file), 'utf8')

/** Path from the root that an import of ours names, without its ending; null for a package or Nuxt's own. */
export function importedPath(file: string, specifier: string): string | null {
  if (specifier.startsWith('.')) return relative(root, join(root, file, '..', specifier))
  for (const [alias, folder] of Object.entries(aliases)) {
    if (specifier.startsWith(`${alias}/`)) return relative(root, join(folder, specifier.slice(alias.length + 1)))
  }
  return null
}

/** Specifiers of all imports and re-exports of a source file, dynamic ones too. */
export function importsOf(source: string): string[] {
  const patterns = [/(?:^|[\s;])(?:import|export)\s[^'"`;]*?from\s*['"]([^'"]+)['"]/g, /(?:^|[\s;])import\s*['"]([^'"]+)['"]/g, /\bimport\(\s*['"]([^'"]+)['"]/g]
  return patterns.flatMap(pattern => [...source.matchAll(pattern)].map(match => match[1] ?? ''))
}

function isPresent(file: string): boolean {
  try {
    readFileSync(join(root, file))
    return true
  }
  catch {
    return false
  }
}

function walk(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true })
    .filter(entry => !notOurs.has(entry.name) && !entry.name.startsWith('.data'))
    .flatMap(entry => entry.isDirectory() ? walk(join(folder, entry.name)) : [relative(root, join(folder, entry.name))])
}
