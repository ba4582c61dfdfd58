import { z } from 'zod'
import {
  columnMeanings, dateOrders, decisionActions, directions, encodings, mostRows, problemCodes, problemTones, questionCodes, rowStates, tableFormats, uncertaintyMeanings,
} from '#shared/tables/types'
import { id, instant, named } from './common'
import { fitResultContract } from './fit'
import { saltContract } from './series'

/** The largest file an import takes, in bytes; said before the upload. */
export const largestFile = 10_000_000

export const importParams = z.object({ import: id })

/** A paste; a file comes as multipart/form-data with the field `file`. */
export const pasteContract = z.strictObject({
  text: z.string().min(1, 'must not be empty').max(largestFile, 'must be at most 10 MB'),
  name: z.string().trim().min(1).max(200).default('pasted table').describe('what the table is called in the history'),
})

export const rowCountsContract = z.object({
  total: z.number().int().describe('rows below the header that hold anything, and lines above it that are kept'),
  ready: z.number().int(),
  toDecide: z.number().int(),
  unreadable: z.number().int(),
  kept: z.number().int(),
}).describe('ready + toDecide + unreadable + kept = total')

const columnFields = {
  index: z.number().int().min(0).describe('from 0'),
  meaning: z.enum(columnMeanings),
  unit: z.string().max(20).nullable().describe(`mol/L, mmol/L, mol/kg, mmol/kg; °C, K, °F; a date order (${dateOrders.join(', ')}); or null`),
  direction: z.enum(directions).nullable(),
  salt: z.string().max(80).nullable().describe('the salt whose cloud points the column holds'),
  uncertaintyMeaning: z.enum(uncertaintyMeanings).nullable(),
  of: z.number().int().nullable().describe('index of the column an uncertainty belongs to'),
}
export const columnContract = z.object({ ...columnFields, header: z.string() })

export const problemContract = z.object({
  row: z.number().int().describe('as the file shows it'),
  column: z.number().int().nullable(),
  columns: z.array(z.number().int()).optional().describe('every cell it speaks of, where there are several'),
  code: z.enum(problemCodes),
  tone: z.enum(problemTones),
  message: z.string(),
  detail: z.string(),
  suggestion: z.string().optional(),
  group: z.string().optional(),
})

export const questionContract = z.object({
  code: z.enum(questionCodes),
  subject: z.string(),
  message: z.string(),
  options: z.array(z.object({ value: z.string(), label: z.string() })),
  answer: z.string().nullable(),
  isAssumed: z.boolean().describe('true: nobody has answered yet, the answer is ours'),
  isBlocking: z.boolean().describe('true: nothing is imported before it is answered'),
})

const decisionContract = z.strictObject({
  row: z.number().int().min(1),
  column: z.number().int().min(0).nullish().transform(column => column ?? null),
  action: z.enum(decisionActions).optional().describe('default: correct with a value, else agree'),
  value: z.string().max(500).optional().describe('correct: the cell as it should read; set-aside: the reason'),
}).transform(({ action, ...decision }) => ({ ...decision, action: action ?? (decision.value === undefined ? 'agree' as const : 'correct' as const) }))

/** How the table is to be read. Each part given replaces that part; decisions and answers are added, the newest word on a cell holds. */
export const changeImportContract = z.strictObject({
  sheet: z.string().max(200).optional(),
  encoding: z.enum(encodings).optional(),
  delimiter: z.enum([',', ';', '\t', '|', 'space']).optional(),
  decimal: z.enum(['.', ',']).optional(),
  headerRow: z.number().int().min(0).optional().describe('0: there is none'),
  unitsRow: z.number().int().min(0).optional().describe('0: there is none'),
  columns: z.array(z.strictObject({
    index: columnFields.index, meaning: columnFields.meaning.optional(), unit: columnFields.unit.optional(), direction: columnFields.direction.optional(),
    salt: columnFields.salt.optional(), uncertaintyMeaning: columnFields.uncertaintyMeaning.optional(), of: columnFields.of.optional(),
  })).max(100).optional(),
  answers: z.array(z.strictObject({ code: z.enum(questionCodes), subject: z.string().max(200).default(''), value: z.string().max(200) })).max(200).optional(),
  decisions: z.array(decisionContract).max(mostRows).optional(),
})
export type ChangeImport = z.infer<typeof changeImportContract>

export const importStates = ['open', 'committed', 'discarded'] as const
/** Problems beyond this many are counted and left off; the rows list them. */
export const mostProblems = 2_000

export const importContract = z.object({
  id,
  state: z.enum(importStates),
  campaign: z.object({ id, name: z.string(), lab: named }),
  project: named,
  file: z.object({ name: z.string(), size: z.number().int(), sha256: z.string(), by: z.string(), at: instant }),
  format: z.enum(tableFormats),
  encoding: z.enum(encodings).nullable(),
  sheets: z.array(z.string()),
  sheet: z.string().nullable(),
  delimiter: z.string().nullable(),
  decimal: z.enum(['.', ',', 'both']),
  form: z.enum(['long', 'wide']),
  headerRow: z.number().int().nullable(),
  unitsRow: z.number().int().nullable(),
  rows: rowCountsContract,
  readings: z.number().int().describe('readings that the ready rows hold'),
  columns: z.array(columnContract),
  problems: z.array(problemContract),
  problemsLeftOff: z.number().int(),
  questions: z.array(questionContract),
  remarks: z.array(z.string()),
  recipe: named.nullable().describe('the recipe by which the columns were read'),
  series: z.array(z.object({ id, salt: saltContract, revision: z.number().int(), readings: z.number().int() })).describe('what a committed import made'),
})
export type TableImport = z.infer<typeof importContract>

export const importSummaryContract = z.object({
  id, name: z.string(), state: z.enum(importStates), campaign: z.object({ id, name: z.string(), lab: named }),
  rows: rowCountsContract, by: z.string(), at: instant,
})
export type ImportSummary = z.infer<typeof importSummaryContract>

export const importRowsQuery = z.object({
  state: z.enum(rowStates).optional(),
  look: z.enum(['yes']).optional().describe('yes: only rows that say something'),
  after: z.coerce.number().int().min(0).default(0).describe('rows below this one'),
  limit: z.coerce.number().int().min(1).max(500).default(200),
})
export const importRowsContract = z.object({
  items: z.array(z.object({ row: z.number().int(), state: z.enum(rowStates), cells: z.array(z.string()), problems: z.array(problemContract) })),
  next: z.number().int().nullable().describe('give as `after` for the next rows'),
})
export type ImportRows = z.infer<typeof importRowsContract>

/** Naming a recipe keeps how the columns were read for the lab's next file of this kind. */
export const commitImportContract = z.strictObject({ recipe: z.string().trim().min(1).max(120).optional() })
export const committedContract = z.object({
  series: z.array(z.object({
    id, salt: saltContract, revision: z.number().int(), readings: z.number().int().describe('readings that this import brought'),
    fit: fitResultContract.extend({ id }).nullable(),
  })),
  batches: z.array(z.object({ id, label: z.string(), blanks: z.number().int() })),
})
export type Committed = z.infer<typeof committedContract>
