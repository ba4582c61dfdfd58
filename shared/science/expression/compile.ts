/** From the text of an expression to its tape. Only this folder knows mathjs, and only the server loads it. */
import { parse, type MathNode } from 'mathjs/number'
import type { InputProblem } from '../errors'
import { operations, type FunctionName, type Operation } from './operations'
import { Tape } from './tape'

export const longestExpression = 500
export const mostParameters = 12
const deepestNesting = 40
const mostNodes = 300

const operators: Readonly<Record<string, Operation>> = {
  add: 'add', subtract: 'subtract', multiply: 'multiply', divide: 'divide', pow: 'power', unaryMinus: 'negate',
}
const synonyms: Readonly<Record<string, Operation>> = { ln: 'log', arctan: 'atan', arcsin: 'asin', arccos: 'acos', pow: 'power' }
const notFunctions: readonly string[] = [...Object.values(operators)]
const functions = new Map<string, Operation>([
  ...Object.keys(operations).filter(name => !notFunctions.includes(name)).map(name => [name, name as FunctionName] as const),
  ...Object.entries(synonyms),
])
const constants = new Map([['pi', Math.PI], ['e', Math.E]])

export interface Compiled {
  tape: Tape
  /** Place of the value, and of the derivative by each parameter. */
  value: number
  slopes: number[]
  variables: readonly string[]
  parameters: readonly string[]
}

/** Why a name cannot stand for a variable or a parameter; null when it can. */
export function nameProblem(name: string): string | null {
  if (!/^[A-Za-z]\w{0,29}$/.test(name)) return 'a name is a letter followed by letters, digits or underscores, at most 30 in all'
  if (constants.has(name)) return `${name} is a constant; choose another name`
  return functions.has(name) ? `${name} is a function; choose another name` : null
}

/** @returns the compiled expression, or everything that is wrong with it */
export function compile(text: string, variables: readonly string[], parameters: readonly string[]): Compiled | InputProblem[] {
  const path = 'model.expression'
  if (text.length > longestExpression) return [{ path, message: `the expression has ${text.length} characters; at most ${longestExpression} are taken` }]
  let tree: MathNode
  try {
    tree = parse(text)
  }
  catch (error) {
    return [{ path, message: `cannot be read: ${error instanceof Error ? error.message : 'syntax error'}` }]
  }
  const names = new Map([...variables, ...parameters].map((name, at) => [name, at]))
  const tape = new Tape(names.size)
  const reader = new Reader(tape, names)
  const value = reader.read(tree, 1)
  if (reader.problems.size === 0) {
    for (const name of parameters) {
      if (!reader.used.has(name)) reader.problems.add(`does not contain the parameter ${name}; use it or leave it out`)
    }
  }
  if (reader.problems.size > 0) return [...reader.problems].map(message => ({ path, message }))
  const slopes = parameters.map(name => tape.derivative(value, names.get(name)!))
  const idle = parameters.filter((_, j) => tape.constantAt(slopes[j]!) === 0)
  if (idle.length > 0) return idle.map(name => ({ path, message: `its value does not depend on the parameter ${name}; leave it out or use it` }))
  return { tape, value, slopes, variables, parameters }
}

/** Walks the parsed tree; anything outside the list of allowed parts becomes a problem, and reading goes on. */
class Reader {
  readonly problems = new Set<string>()
  readonly used = new Set<string>()
  private count = 0

  constructor(private readonly tape: Tape, private readonly names: ReadonlyMap<string, number>) {}

  read(node: MathNode, depth: number): number {
    if (depth > deepestNesting) return this.reject(`is nested more than ${deepestNesting} levels deep; simplify it`)
    if (++this.count > mostNodes) return this.reject(`has more than ${mostNodes} parts; simplify it`)
    const part = node as unknown as Part
    switch (part.type) {
      case 'ParenthesisNode': return this.read(part.content, depth + 1)
      case 'ConstantNode': return this.readConstant(part.value)
      case 'SymbolNode': return this.readName(part.name)
      case 'OperatorNode': return this.readOperator(part, depth)
      case 'FunctionNode': return this.readCall(part, depth)
      default: return this.reject(`contains ${forbidden[part.type] ?? 'something other than arithmetic'}; only arithmetic, the listed functions, the variable and the parameters are allowed`)
    }
  }

  private reject(message: string): number {
    this.problems.add(message)
    return this.tape.constant(1)
  }

  private readConstant(value: unknown): number {
    if (typeof value !== 'number' || !Number.isFinite(value)) return this.reject(`contains ${String(value)}, which is not a finite number`)
    return this.tape.constant(value)
  }

  private readName(name: string): number {
    const place = this.names.get(name)
    if (place !== undefined) {
      this.used.add(name)
      return place
    }
    const constant = constants.get(name)
    if (constant !== undefined) return this.tape.constant(constant)
    return this.reject(`contains ${name}, which is neither the variable nor a parameter; declare it as a parameter with a start`)
  }

  private readOperator(part: OperatorPart, depth: number): number {
    const [left, right] = part.args
    if (part.fn === 'unaryPlus') return this.read(left!, depth + 1)
    const operation = Object.hasOwn(operators, part.fn) ? operators[part.fn] : undefined
    if (!operation) return this.reject(`contains the operator ${part.op}; use + − * / ^`)
    const a = this.read(left!, depth + 1)
    return right ? this.tape.apply(operation, a, this.read(right, depth + 1)) : this.tape.apply(operation, a)
  }

  private readCall(part: CallPart, depth: number): number {
    const name = part.fn.type === 'SymbolNode' ? part.fn.name : 'a property'
    const operation = functions.get(name)
    if (!operation) return this.reject(`calls ${name}, which is not one of ${[...functions.keys()].join(', ')}`)
    const expected = operation === 'power' ? 2 : 1
    if (part.args.length !== expected) return this.reject(`${name} takes ${expected === 1 ? 'one argument' : 'two arguments'}, not ${part.args.length}`)
    const places = part.args.map(argument => this.read(argument, depth + 1))
    return this.tape.apply(operation, places[0]!, places[1] ?? places[0]!)
  }
}

interface OperatorPart { type: 'OperatorNode', fn: string, op: string, args: MathNode[] }
interface CallPart { type: 'FunctionNode', fn: { type: 'SymbolNode', name: string } | { type: 'AccessorNode' }, args: MathNode[] }

/** The parts of mathjs's tree that are read; everything else falls through to the refusal. */
type Part
  = | { type: 'ParenthesisNode', content: MathNode }
    | { type: 'ConstantNode', value: unknown }
    | { type: 'SymbolNode', name: string }
    | OperatorPart
    | CallPart
    | { type: 'Other' }

const forbidden: Readonly<Record<string, string>> = {
  AssignmentNode: 'an assignment',
  FunctionAssignmentNode: 'a function definition',
  BlockNode: 'several statements',
  AccessorNode: 'access to a property',
  IndexNode: 'an index',
  ArrayNode: 'a list',
  ObjectNode: 'an object',
  ConditionalNode: 'a condition',
  RangeNode: 'a range',
  RelationalNode: 'a comparison',
}
