/** Runs in a thread of its own: one question about one table a call. Errors do not keep their class across threads, so a refusal travels as a value. */
import type { MessagePort } from 'node:worker_threads'
import { TableError } from '#shared/tables/types'
import { answer, type Answers, type Question } from './tables/answers'
import { understandingOf, type Table } from './tables/understandings'

export interface Task { table: Table, question: Question }
export type Outcome = { answer: Answers[Question['kind']] } | { refusal: { code: TableError['code'], message: string } } | { isUnknown: true }

export default async function carryOut({ begun, table, question }: Task & { begun: MessagePort }): Promise<Outcome> {
  begun.postMessage('begun')
  try {
    const understanding = await understandingOf(table)
    return understanding ? { answer: answer(understanding, question) } : { isUnknown: true }
  }
  catch (error) {
    if (error instanceof TableError) return { refusal: { code: error.code, message: error.message } }
    throw error
  }
}
