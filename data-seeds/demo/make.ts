import { writeFileSync } from 'node:fs'
import { toTable } from './csv'
import { generateReadings } from './generate'

// Run from the repository root by `npm run demo:make`.
const file = 'data-seeds/demo/readings.tsv'
const readings = generateReadings()
writeFileSync(file, toTable(readings))
console.log(`${readings.length} readings written to ${file}`)
