import { describe, expect, it } from 'vitest'
import { fieldsOf, operationsOf } from '~~/composables/apiOperations'

describe('fieldsOf', () => {
  it('lists inner fields after their owner, one deeper', () => {
    const fields = fieldsOf({
      type: 'object', required: ['points'],
      properties: {
        points: { type: 'array', items: { type: 'object', properties: { x: { type: 'number', description: 'mol/L' } } } },
        model: { anyOf: [{ type: 'string', enum: ['linear'] }, { type: 'object', properties: { expression: { type: 'string' } } }] },
      },
    })
    expect(fields.map(({ name, depth }) => [name, depth])).toEqual([['points', 0], ['x', 1], ['model', 0], ['expression', 1]])
    expect(fields[0]).toMatchObject({ kind: 'list of object', isRequired: true })
    expect(fields[1]).toMatchObject({ description: 'mol/L', isRequired: false })
    expect(fields[2]?.kind).toBe('"linear" | object')
  })

  it('has none for a bare value or nothing', () => {
    expect([...fieldsOf({ type: 'string' }), ...fieldsOf(undefined)]).toEqual([])
  })
})

describe('operationsOf', () => {
  it('reads what an operation takes, gives and who may use it', () => {
    const [operation] = operationsOf({
      info: { version: '1' },
      paths: {
        '/api/v1/things/{id}': {
          post: {
            'summary': 'Make a thing', 'description': 'Anyone.', 'x-access': 'anyone',
            'parameters': [{ name: 'id', in: 'path', required: true, schema: { type: 'string' } }],
            'requestBody': { content: { 'application/json': { schema: { properties: { name: { type: 'string' } } } } } },
            'responses': { default: {}, 201: { content: { 'application/json': { schema: { properties: { id: { type: 'string' } } } } } } },
          },
        },
      },
    })
    expect(operation).toMatchObject({ method: 'POST', path: '/api/v1/things/{id}', summary: 'Make a thing', access: 'Anyone.' })
    expect([operation?.parameters, operation?.takes, operation?.gives].map(fields => fields?.map(field => field.name))).toEqual([['id'], ['name'], ['id']])
  })
})
