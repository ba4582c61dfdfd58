import type { TableError, tableRefusals } from '#shared/tables/types'
import { objects } from '~~/server/utils/object-store'
import type { Outcome, Task } from '~~/server/workers/table'
import type { Answers, Question } from '~~/server/workers/tables/answers'
import type { Table } from '~~/server/workers/tables/understandings'
import { ServiceError, type Refusal } from '../errors'
import { workshop } from '../threads'

// One thread: it remembers the tables it has read, and a second one would read each of them again.
const { run, close } = workshop<Task, Outcome>({
  file: 'table', threads: 1, timeLimit: 5_000, memory: 512, longestQueue: 20,
  isBusy: 'Many tables are being read right now. Try again in a few seconds.',
  tooSlow: () => refused({ code: 'too-slow', message: 'Reading the table was stopped after five seconds. Cut it into several files, or leave out what is no reading.' }),
})
export { close as closeTablePool }

/** Refusals for their size alone. */
const tooLarge: readonly typeof tableRefusals[number][] = ['too-large-inside', 'too-many-rows', 'too-many-columns']

function refused({ code, message }: Pick<TableError, 'code' | 'message'>): ServiceError {
  const refusal: Refusal = tooLarge.includes(code) ? 'too-large' : 'invalid'
  return new ServiceError(refusal, message, { faults: [{ path: 'file', message }] })
}

/**
 * Asks the thread about a table; it remembers the last few, otherwise the bytes are fetched from the object store.
 *
 * @throws ServiceError 'invalid' or 'too-large' where the file cannot be taken, with what to do
 */
export async function askTable<Kind extends Question['kind']>(table: Table, question: Extract<Question, { kind: Kind }>): Promise<Answers[Kind]> {
  const first = await run({ table, question })
  const outcome = 'isUnknown' in first ? await run({ table: { ...table, bytes: await objects().get(table.sha256) }, question }) : first
  if ('refusal' in outcome) throw refused(outcome.refusal)
  if ('isUnknown' in outcome) throw new Error('the thread did not take the bytes of a table')
  return outcome.answer as Answers[Kind]
}
