import { defineEventHandler, getQuery, getRouterParams, setResponseHeader, setResponseStatus, type EventHandler, type H3Event } from 'h3'
import type { z } from 'zod'
import { ServiceError, type Fault } from '~~/server/services/errors'
import type { SentFile } from '~~/server/services/export/export'
import type { Visitor } from '~~/server/services/sessions'
import { nowhere, type AccessRule } from './access'
import { hasFile, ordinaryBody, readFile, readJson, type UploadedFile } from './body'
import { sendEvents, type StreamedEvent } from './event-stream'
import { examine } from './faults'
import { sendFile } from './send-file'
import { countSentence, sendProblem } from './problem'
import { stopping } from './stopping'

interface Call<Person, Params, Query, Input> {
  event: H3Event
  person: Person
  params: Params
  query: Query
  input: Input
  /** What came as a form with the field `file`, where the route takes one; `input` is undefined then. */
  file: UploadedFile | null
  /** Aborted when the caller has gone or the server stops. */
  signal: AbortSignal
}

/** A route, declared once: what it is for, who may call it, what it takes and gives, and the one call that does it. */
export interface Declaration<Person extends Visitor | null = Visitor | null, Params = unknown, Query = unknown, Input = unknown, Given = unknown, Answer = unknown> {
  summary: string
  access: AccessRule<Person>
  params?: z.ZodType<Params>
  query?: z.ZodType<Query>
  input?: z.ZodType<Input>
  /** The answer's contract; for a stream, the contract of each event's data; null answers without a body. */
  answer: z.ZodType<Answer, Given> | null
  status?: 200 | 201 | 202 | 204
  streams?: boolean
  /** Answers with a file; `handle` gives a SentFile. */
  sendsFile?: boolean
  /** Most bytes of the body. */
  bodyLimit?: number
  /** An empty body counts as {}. */
  isBodyOptional?: boolean
  /** Takes a form with the field `file` in place of the JSON of `input`. */
  takesFile?: boolean
  /** Faults that only show beside each other, looked for when the contract has already found some: so that all come at once. */
  examineFurther?: (given: unknown) => Promise<readonly Fault[]>
  /** Called before anything is read: refuses who calls too often. */
  admitRate?: (event: H3Event) => Promise<void>
  handle: (call: Call<Person, Params, Query, Input>) => Given | Promise<Given> | AsyncIterable<StreamedEvent> | Promise<SentFile>
}

const declarations = new WeakMap<EventHandler, Declaration>()

/** Makes a handler of a declaration: guard, then validate, then one call, then the answer held against its contract. */
export function route<Person extends Visitor | null, Params = undefined, Query = undefined, Input = undefined, Given = void, Answer = Given>(
  declaration: Declaration<Person, Params, Query, Input, Given, Answer>,
): EventHandler {
  const handler = defineEventHandler(async (event) => {
    try {
      return await carryOut(event, declaration)
    }
    catch (error) {
      return sendProblem(event, error)
    }
  })
  declarations.set(handler, declaration as unknown as Declaration)
  return handler
}

/** The declaration behind a handler; undefined for anything that is not made by `route`. */
export function declarationOf(handler: EventHandler): Declaration | undefined {
  return declarations.get(handler)
}

async function carryOut<Person extends Visitor | null, Params, Query, Input, Given, Answer>(
  event: H3Event, declaration: Declaration<Person, Params, Query, Input, Given, Answer>,
) {
  await declaration.admitRate?.(event)
  const params = readParams(event, declaration.params)
  const person = await declaration.access.admit(event, params as Record<string, string>)
  const file = declaration.takesFile && hasFile(event) ? await readFile(event, declaration.bodyLimit ?? ordinaryBody) : null
  const { query, input } = await readInput(event, file ? { ...declaration, input: undefined } : declaration)
  const given = await declaration.handle({ event, person, params, query, input, file, signal: closing(event) })
  setResponseHeader(event, 'cache-control', 'no-store')
  if (declaration.streams) return sendEvents(event, given as AsyncIterable<StreamedEvent>)
  if (declaration.sendsFile) return sendFile(event, given as SentFile)
  setResponseStatus(event, declaration.status ?? (declaration.answer ? 200 : 204))
  // Parsing drops whatever the contract does not name and refuses NaN: nothing leaves that is not written down.
  return declaration.answer ? declaration.answer.parse(given) : null
}

// An id that cannot be one names nothing.
function readParams<Params>(event: H3Event, contract: z.ZodType<Params> | undefined): Params {
  if (!contract) return undefined as Params
  const examined = examine(contract, getRouterParams(event))
  if ('faults' in examined) throw nowhere()
  return examined.value
}

async function readInput<Query, Input>(
  event: H3Event, { query, input, bodyLimit = ordinaryBody, isBodyOptional = false, examineFurther }: Pick<Declaration<never, never, Query, Input>, 'query' | 'input' | 'bodyLimit' | 'isBodyOptional' | 'examineFurther'>,
): Promise<{ query: Query, input: Input }> {
  const faults: Fault[] = []
  const take = <Value>(contract: z.ZodType<Value> | undefined, given: unknown, root = ''): Value => {
    if (!contract) return undefined as Value
    const examined = examine(contract, given, root)
    if ('value' in examined) return examined.value
    faults.push(...examined.faults)
    return undefined as Value
  }
  const body = input ? await readJson(event, bodyLimit, isBodyOptional) : undefined
  const taken = { query: take(query, getQuery(event), 'query'), input: take(input, body) }
  if (faults.length > 0) {
    const known = new Set(faults.map(({ path }) => path))
    faults.push(...(await examineFurther?.(body) ?? []).filter(({ path }) => !known.has(path)))
    throw new ServiceError('invalid', countSentence(faults.length), { faults })
  }
  return taken
}

function closing(event: H3Event): AbortSignal {
  const controller = new AbortController()
  event.node.res.once('close', () => controller.abort())
  return AbortSignal.any([controller.signal, stopping])
}
