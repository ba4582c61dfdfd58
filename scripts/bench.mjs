/** Times the fit engine beside scipy's curve_fit in the same run and prints ratios next to the goals of docs/numerics.md. */
import { spawnSync } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { build } from 'esbuild'

const root = fileURLToPath(new URL('..', import.meta.url))
const series = join(root, 'tests/bench/series.json')
// Debian's own interpreter, whatever else is on the path: its python3-scipy is what the goals were set against.
const python = '/usr/bin/python3'

/**
 * @param {string} command
 * @param {string[]} given
 */
function measure(command, given) {
  const { status, stdout, stderr } = spawnSync(command, given, { encoding: 'utf8' })
  if (status !== 0) throw new Error(`${command} ${given[0]} ended with ${status}\n${stderr}`)
  return JSON.parse(stdout)
}

async function measureEngine() {
  const folder = mkdtempSync(join(tmpdir(), 'anionary-bench-'))
  try {
    const outfile = join(folder, 'engine.mjs')
    await build({
      entryPoints: [join(root, 'tests/bench/engine.ts')],
      outfile, bundle: true, platform: 'node', format: 'esm', logLevel: 'error',
      alias: { '#shared': join(root, 'shared') },
      banner: { js: 'import { createRequire } from \'node:module\'; const require = createRequire(import.meta.url);' },
    })
    return measure(process.execPath, [outfile, series])
  }
  finally {
    rmSync(folder, { recursive: true })
  }
}

function hasScipy() {
  return spawnSync(python, ['-c', 'import scipy.optimize']).status === 0
}

/** @param {(string | number)[][]} rows */
function printTable(rows) {
  const widthOf = (/** @type {number} */ column) => Math.max(...rows.map(row => String(row[column]).length))
  const pad = (/** @type {string | number} */ cell, /** @type {number} */ column) =>
    column === 0 ? String(cell).padEnd(widthOf(column)) : String(cell).padStart(widthOf(column))
  for (const row of rows) console.log(row.map(pad).join('   '))
}

const microseconds = (/** @type {number} */ value) => `${value.toFixed(1)} µs`

const engine = await measureEngine()
const scipy = hasScipy() ? measure(python, [join(root, 'tests/bench/reference.py'), series]) : null
if (!scipy) console.log('scipy is missing, so there are no ratios; install it with: sudo apt-get install -y python3-scipy')

const ratio = (/** @type {'near' | 'default'} */ reference) => scipy ? `${(scipy[reference] / engine.core).toFixed(1)} ×` : 'no scipy'
printTable([
  ['12-point linear-langmuir', 'measured', 'beside', 'goal'],
  ['fit with covariance', microseconds(engine.core), '', ''],
  ['curve_fit, analytic Jacobian, near start', scipy ? microseconds(scipy.near) : '', ratio('near'), '≥ 4 ×'],
  ['curve_fit, default start', scipy ? microseconds(scipy.default) : '', ratio('default'), '≥ 15 ×'],
  ['whole answer: profile intervals, residuals, notes', microseconds(engine.whole), '', ''],
  ['typed expression, parsing and covariance', microseconds(engine.expression), `${Math.round(1e6 / engine.expression)} a second`, '≥ 1000 a second'],
  ['2,000 fits of resampled readings', `${engine.bootstrap.toFixed(0)} ms`, '', '≤ 200 ms'],
  ['profile interval of K', microseconds(engine.interval), '', '≤ 50 µs'],
])
console.log(`Node ${process.version}${scipy ? `, scipy ${scipy.version}` : ''}; medians, warm; ratios are curve_fit's time over the engine's.`)
