import type { Question, TableChoices } from '../types'

type Asked = Pick<Question, 'code' | 'subject' | 'message' | 'options'>

/**
 * A question with the answer in force: a person's, else ours (`assumed`), else none, and then nothing is imported before it is answered.
 */
export function ask(asked: Asked, assumed: string | null, choices: TableChoices): Question {
  const given = choices.answers?.findLast(({ code, subject }) => code === asked.code && subject === asked.subject)?.value
  const answer = given ?? assumed
  return { ...asked, answer, isAssumed: given === undefined && assumed !== null, isBlocking: answer === null }
}

export const isOneOf = <T extends string>(values: readonly T[], value: string | null): value is T => values.some(known => known === value)

export const optionsOf = (values: readonly string[], labels: Readonly<Record<string, string>> = {}) => values.map(value => ({ value, label: labels[value] ?? value }))
