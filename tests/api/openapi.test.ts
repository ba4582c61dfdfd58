import { describe, expect, it } from 'vitest'
import { nobody } from './support/server'

interface Schema { $ref?: string, [key: string]: unknown }
interface Operation {
  'summary': string
  'x-access': string
  'parameters': { name: string, in: string, required: boolean, schema: Schema }[]
  'requestBody'?: { content: Record<string, { schema: Schema }> }
  'responses': Record<string, { description: string, content?: Record<string, { schema: Schema }> }>
}
interface Description {
  openapi: string
  info: { title: string, version: string }
  paths: Record<string, Record<string, Operation>>
  components: { schemas: Record<string, Schema> }
}

const { body } = await nobody().get('/api/v1/openapi.json').expect(200)
const description = body as Description
const operations = Object.entries(description.paths).flatMap(([path, methods]) =>
  Object.entries(methods).map(([method, operation]) => ({ name: `${method} ${path}`, path, operation })))

describe('the description of the API', () => {
  it('is OpenAPI 3.1 with the routes of the fixed contract', () => {
    expect(description.openapi).toMatch(/^3\.1\./)
    expect(operations.map(one => one.name)).toEqual(expect.arrayContaining([
      'post /api/v1/fit', 'post /api/auth/sign-in', 'post /api/auth/sign-out', 'get /api/v1/me', 'get /api/v1/projects', 'post /api/v1/projects',
      'get /api/v1/projects/{project}', 'get /api/v1/series/{series}', 'get /api/health', 'get /api/ready', 'get /api/v1/openapi.json',
    ]))
  })

  it('points only at schemas that are there', () => {
    const references = [...JSON.stringify(description).matchAll(/"\$ref":"(.*?)"/g)].map(([, reference]) => reference!)
    const missing = references.filter(reference => !(reference.replace('#/components/schemas/', '') in description.components.schemas))
    expect(missing).toEqual([])
  })

  it.each(operations)('tells for $name what goes in, what comes out and who may call', ({ path, operation }) => {
    expect(operation.summary).not.toBe('')
    expect(operation['x-access']).not.toBe('')
    const named = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name)
    const described = operation.parameters.filter(one => one.in === 'path')
    expect(described.map(one => one.name)).toEqual(named)
    expect(described.every(one => one.required)).toBe(true)
    expect(Object.keys(operation.responses)).toContain('default')
  })

  it('states units and limits of the fit', () => {
    const { schema } = description.paths['/api/v1/fit']!.post!.requestBody!.content['application/json']!
    expect(JSON.stringify(schema)).toMatch(/mol\/L/)
    expect(JSON.stringify(schema)).toMatch(/"maxItems":5000/)
  })
})
