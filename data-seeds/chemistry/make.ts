import { readFileSync, writeFileSync } from 'node:fs'
import { cautionTable } from './cautions'

// Run from the repository root by `npm run cautions:make`.
const file = 'shared/science/chemistry/cautions.json'
const table = cautionTable(readFileSync('data-seeds/chemistry/hazards.csv', 'utf8'), readFileSync('data-seeds/chemistry/h_statements.csv', 'utf8'))
writeFileSync(file, `${JSON.stringify(table, null, 1)}\n`)
console.log(`cautions of ${table.salts.length} salts written to ${file}`)
