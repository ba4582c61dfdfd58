import type { z } from 'zod'
import type { Fault } from '~~/server/services/errors'

type Issue = z.core.$ZodIssue

/** Validates and gives the value, or every fault with its place written as a path such as `points.3.sd`. */
export function examine<Value>(contract: z.ZodType<Value>, given: unknown, root = ''): { value: Value } | { faults: Fault[] } {
  const result = contract.safeParse(given, { reportInput: true })
  if (result.success) return { value: result.data }
  return { faults: result.error.issues.flatMap(issue => faultsOf(issue, root)) }
}

function faultsOf(issue: Issue, root: string): Fault[] {
  const path = [root, ...issue.path.map(String)].filter(Boolean).join('.')
  switch (issue.code) {
    case 'invalid_union': return faultsOfUnion(issue, path)
    case 'unrecognized_keys': return issue.keys.map(key => ({ path: path ? `${path}.${key}` : key, message: 'is not known here; leave it out or check its spelling' }))
    case 'invalid_type': return [{ path, message: typeSentence(issue) }]
    case 'invalid_value': return [{ path, message: `must be one of ${issue.values.map(String).join(', ')}` }]
    default: return [{ path, message: issue.message }]
  }
}

// Of the shapes a value may have, the one it comes closest to is the one worth talking about.
function faultsOfUnion(issue: Extract<Issue, { code: 'invalid_union' }>, path: string): Fault[] {
  const isAtRoot = ({ code, path: inside }: Issue) => inside.length === 0 && (code === 'invalid_type' || code === 'invalid_value')
  const inside = issue.errors.filter(branch => !branch.some(isAtRoot))
  const closest = inside.sort((one, other) => one.length - other.length)[0]
  if (closest) return closest.flatMap(one => faultsOf(one, path))
  const shapes = [...new Set(issue.errors.flat().filter(isAtRoot).map(shapeOf))].join(', or ')
  return [{ path, message: issue.input === undefined ? `is missing; it must be ${shapes}` : `must be ${shapes}` }]
}

function shapeOf(issue: Issue): string {
  if (issue.code === 'invalid_value') return `one of ${issue.values.map(String).join(', ')}`
  return issue.code === 'invalid_type' ? kinds[issue.expected] ?? issue.expected : ''
}

const kinds: Record<string, string> = { number: 'a finite number', int: 'a whole number', string: 'text', array: 'a list', object: 'an object', record: 'an object', boolean: 'true or false' }

function typeSentence(issue: Extract<Issue, { code: 'invalid_type' }>): string {
  const wanted = kinds[issue.expected] ?? issue.expected
  if (issue.input === undefined) return `is missing; it must be ${wanted}`
  return `must be ${wanted}, not ${describe(issue.input)}`
}

const longestQuote = 40

function describe(value: unknown): string {
  if (value === null) return 'null'
  if (typeof value === 'string') return `the text ${JSON.stringify(value.length > longestQuote ? `${value.slice(0, longestQuote)}…` : value)}`
  if (typeof value === 'number') return Number.isInteger(value) ? 'a whole number' : Number.isFinite(value) ? String(value) : 'a number too large to hold'
  return Array.isArray(value) ? 'a list' : typeof value === 'object' ? 'an object' : String(value)
}
