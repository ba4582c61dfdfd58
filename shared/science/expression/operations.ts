/** What an expression may do, each operation with its value and the chain rule for it. */
import type { Tape } from './tape'

interface Rule {
  value(a: number, b: number): number
  /** Applies the operation to `count` readings: room[out + i] from room[a + i] and room[b + i]. */
  block(room: Float64Array, a: number, b: number, out: number, count: number): void
  /** Place of the derivative, from the operands, the result `at` and the operands' derivatives. */
  slope(tape: Tape, left: number, right: number, at: number, leftSlope: number, rightSlope: number): number
}

function rule(value: Rule['value'], slope: Rule['slope'], block: Rule['block'] = throughCalls(value)): Rule {
  return { value, slope, block }
}

function throughCalls(value: Rule['value']): Rule['block'] {
  return (room, a, b, out, count) => {
    for (let i = 0; i < count; i++) room[out + i] = value(room[a + i]!, room[b + i]!)
  }
}

// The four commonest have loops of their own: a call through a variable in the innermost place costs more than the work.
const addBlock: Rule['block'] = (room, a, b, out, count) => {
  for (let i = 0; i < count; i++) room[out + i] = room[a + i]! + room[b + i]!
}
const subtractBlock: Rule['block'] = (room, a, b, out, count) => {
  for (let i = 0; i < count; i++) room[out + i] = room[a + i]! - room[b + i]!
}
const multiplyBlock: Rule['block'] = (room, a, b, out, count) => {
  for (let i = 0; i < count; i++) room[out + i] = product(room[a + i]!, room[b + i]!)
}
const divideBlock: Rule['block'] = (room, a, b, out, count) => {
  for (let i = 0; i < count; i++) room[out + i] = room[a + i]! / room[b + i]!
}

/** 0·∞ stands for the limit of x^b·ln x at x = 0, which is 0. */
function product(a: number, b: number): number {
  return a === 0 || b === 0 ? 0 : a * b
}

/** f(u) whose derivative by u is f′: the chain rule multiplies by the operand's own. */
function unary(value: (u: number) => number, derivative: (tape: Tape, operand: number, at: number) => number): Rule {
  return rule(value, (tape, left, _right, at, leftSlope) =>
    tape.constantAt(leftSlope) === 0 ? leftSlope : tape.apply('multiply', derivative(tape, left, at), leftSlope))
}

const over = (tape: Tape, numerator: number, denominator: number) => tape.apply('divide', numerator, denominator)
const one = (tape: Tape) => tape.constant(1)
const squared = (tape: Tape, place: number) => tape.apply('multiply', place, place)

export const operations = {
  add: rule((a, b) => a + b, (tape, _l, _r, _at, dl, dr) => tape.apply('add', dl, dr), addBlock),
  subtract: rule((a, b) => a - b, (tape, _l, _r, _at, dl, dr) => tape.apply('subtract', dl, dr), subtractBlock),
  multiply: rule(product, (tape, l, r, _at, dl, dr) =>
    tape.apply('add', tape.apply('multiply', dl, r), tape.apply('multiply', l, dr)), multiplyBlock),
  divide: rule((a, b) => a / b, (tape, _l, r, at, dl, dr) =>
    over(tape, tape.apply('subtract', dl, tape.apply('multiply', at, dr)), r), divideBlock),
  power: rule((a, b) => b === 2 ? a * a : a ** b, powerSlope),
  negate: unary(u => -u, tape => tape.constant(-1)),
  exp: unary(Math.exp, (_tape, _u, at) => at),
  log: unary(Math.log, (tape, u) => over(tape, one(tape), u)),
  log10: unary(Math.log10, (tape, u) => over(tape, tape.constant(Math.LOG10E), u)),
  log2: unary(Math.log2, (tape, u) => over(tape, tape.constant(Math.LOG2E), u)),
  sqrt: unary(Math.sqrt, (tape, _u, at) => over(tape, tape.constant(0.5), at)),
  cbrt: unary(Math.cbrt, (tape, _u, at) => over(tape, tape.constant(1 / 3), squared(tape, at))),
  abs: unary(Math.abs, (tape, u) => tape.apply('sign', u)),
  sign: unary(Math.sign, tape => tape.constant(0)),
  sin: unary(Math.sin, (tape, u) => tape.apply('cos', u)),
  cos: unary(Math.cos, (tape, u) => tape.apply('negate', tape.apply('sin', u))),
  tan: unary(Math.tan, (tape, _u, at) => tape.apply('add', one(tape), squared(tape, at))),
  asin: unary(Math.asin, (tape, u) => over(tape, one(tape), tape.apply('sqrt', tape.apply('subtract', one(tape), squared(tape, u))))),
  acos: unary(Math.acos, (tape, u) => over(tape, tape.constant(-1), tape.apply('sqrt', tape.apply('subtract', one(tape), squared(tape, u))))),
  atan: unary(Math.atan, (tape, u) => over(tape, one(tape), tape.apply('add', one(tape), squared(tape, u)))),
  sinh: unary(Math.sinh, (tape, u) => tape.apply('cosh', u)),
  cosh: unary(Math.cosh, (tape, u) => tape.apply('sinh', u)),
  tanh: unary(Math.tanh, (tape, _u, at) => tape.apply('subtract', one(tape), squared(tape, at))),
} satisfies Record<string, Rule>

export type Operation = 'add' | 'subtract' | 'multiply' | 'divide' | 'power' | 'negate' | FunctionName
export type FunctionName = 'exp' | 'log' | 'log10' | 'log2' | 'sqrt' | 'cbrt' | 'abs' | 'sign' | 'sin' | 'cos' | 'tan' | 'asin'
  | 'acos' | 'atan' | 'sinh' | 'cosh' | 'tanh'

/** (u^v)′ = v·u^(v−1)·u′ + u^v·ln u·v′; each part only where it is there. */
function powerSlope(tape: Tape, l: number, r: number, at: number, dl: number, dr: number): number {
  const lowered = () => tape.apply('multiply', r, tape.apply('power', l, tape.apply('subtract', r, tape.constant(1))))
  const base = tape.constantAt(dl) === 0 ? dl : tape.apply('multiply', lowered(), dl)
  const exponent = tape.constantAt(dr) === 0 ? dr : tape.apply('multiply', tape.apply('multiply', at, tape.apply('log', l)), dr)
  return tape.apply('add', base, exponent)
}
