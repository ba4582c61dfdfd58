/** As much of an OpenAPI document as the page about the API reads. */
export interface ApiDocument {
  info: { version: string }
  paths: Record<string, Record<string, ApiOperation>>
}

interface ApiOperation {
  'summary': string
  'description': string
  'x-access': string
  'parameters'?: { name: string, in: string, required: boolean, description?: string, schema: Schema }[]
  'requestBody'?: { content: Record<string, { schema: Schema }> }
  'responses': Record<string, { content?: Record<string, { schema: Schema }> }>
}

interface Schema {
  type?: string | string[]
  description?: string
  properties?: Record<string, Schema>
  required?: string[]
  items?: Schema
  anyOf?: Schema[]
  enum?: unknown[]
  const?: unknown
}

/** One field of what is sent or answered; `depth` is how far it lies inside others. */
export interface Field {
  name: string
  depth: number
  kind: string
  isRequired: boolean
  description: string
}

export interface Operation {
  method: string
  path: string
  summary: string
  /** who may, in a sentence */
  access: string
  parameters: Field[]
  takes: Field[]
  gives: Field[]
}

/** What a value may be, in a word or two. */
function kindOf(schema: Schema): string {
  if (schema.const !== undefined) return JSON.stringify(schema.const)
  if (schema.enum) return schema.enum.map(value => JSON.stringify(value)).join(' | ')
  if (schema.anyOf) return [...new Set(schema.anyOf.map(kindOf))].join(' | ')
  if (schema.type === 'array') return `list of ${schema.items ? kindOf(schema.items) : 'values'}`
  return [schema.type ?? 'value'].flat().join(' | ')
}

/** The schema whose fields are listed: lists and choices are looked through. */
function inside(schema: Schema): Schema | undefined {
  if (schema.properties) return schema
  if (schema.items) return inside(schema.items)
  return schema.anyOf?.map(inside).find(found => found !== undefined)
}

/** All fields of a schema in reading order, those of inner objects after their owner. */
export function fieldsOf(schema: Schema | undefined, depth = 0): Field[] {
  const { properties = {}, required = [] } = (schema && inside(schema)) ?? {}
  return Object.entries(properties).flatMap(([name, field]) => [
    { name, depth, kind: kindOf(field), isRequired: required.includes(name), description: field.description ?? '' },
    ...fieldsOf(field, depth + 1),
  ])
}

function bodyOf(content: Record<string, { schema: Schema }> | undefined): Schema | undefined {
  return Object.values(content ?? {})[0]?.schema
}

/** Every operation of the document, in the order of its paths. */
export function operationsOf(document: ApiDocument): Operation[] {
  return Object.entries(document.paths).flatMap(([path, methods]) => Object.entries(methods).map(([method, operation]) => {
    const success = Object.entries(operation.responses).find(([status]) => status.startsWith('2'))?.[1]
    return {
      method: method.toUpperCase(), path, summary: operation.summary, access: operation.description,
      parameters: (operation.parameters ?? []).map(({ name, required, description, schema }) =>
        ({ name, depth: 0, kind: kindOf(schema), isRequired: required, description: description ?? '' })),
      takes: fieldsOf(bodyOf(operation.requestBody?.content)),
      gives: fieldsOf(bodyOf(success?.content)),
    }
  }))
}
