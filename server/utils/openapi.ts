import { libraryRoutes, routes } from '#routes'
import { z } from 'zod'
import { problemContract } from '#shared/contracts/problem'
import { engine } from '#shared/science/version'
import { declarationOf, type Declaration } from './route'

type Json = Record<string, unknown>

/** The OpenAPI document of all declared routes; `x-access` is the access table, `x-library-routes` what is not ours. */
export async function describeApi(): Promise<Json> {
  const paths: Record<string, Json> = {}
  for (const { method, path, load } of routes) {
    const declaration = declarationOf(await load())
    if (declaration) paths[path] = { ...paths[path], [method]: operation(declaration) }
  }
  return {
    'openapi': '3.1.0',
    'info': {
      title: 'Anionary',
      version: engine.version,
      description: 'Fits the effect of salts on cloud points. Concentrations in mol/L, cloud points in °C, differences in K.',
    },
    paths,
    'components': {
      schemas: { Problem: schemaOf(problemContract, 'output') },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'anionary-session' } },
    },
    'x-library-routes': libraryRoutes,
  }
}

const fileForm = { type: 'object', required: ['file'], properties: { file: { type: 'string', format: 'binary' } } }

function operation({ summary, access, params, query, input, takesFile, sendsFile, answer, status, streams }: Declaration): Json {
  const open = access.name === 'anyone'
  return {
    summary,
    'description': access.sentence,
    'x-access': access.name,
    'security': open ? [] : [{ session: [] }],
    'parameters': [...parametersOf(params, 'path'), ...parametersOf(query, 'query')],
    ...(input && { requestBody: { required: true, content: { 'application/json': { schema: schemaOf(input, 'input') }, ...(takesFile && { 'multipart/form-data': { schema: fileForm } }) } } }),
    'responses': {
      [status ?? (answer || sendsFile ? 200 : 204)]: {
        description: summary,
        ...(sendsFile && { content: { '*/*': { schema: { type: 'string', format: 'binary' } } } }),
        ...(answer && { content: { [streams ? 'text/event-stream' : 'application/json']: { schema: schemaOf(answer, 'output') } } }),
      },
      default: { description: 'A problem', content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } },
    },
  }
}

function schemaOf(contract: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _, ...schema } = z.toJSONSchema(contract, { io, unrepresentable: 'any' })
  return schema
}

function parametersOf(contract: z.ZodType | undefined, place: 'path' | 'query'): Json[] {
  if (!contract) return []
  const { properties = {}, required = [] } = schemaOf(contract, 'input') as { properties?: Record<string, Json>, required?: string[] }
  return Object.entries(properties).map(([name, schema]) => ({
    name, in: place, required: place === 'path' || required.includes(name), ...(schema.description ? { description: schema.description } : {}), schema,
  }))
}
