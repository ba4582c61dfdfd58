/**
 * An expression as a list of elementary operations, with its exact derivatives appended by the chain rule. Equal
 * operations are stored once and constants are folded, so the list grows in proportion to the expression, whatever its
 * nesting; blocks of readings are carried through it operation by operation.
 */
import { operations, type Operation } from './operations'

export const blockSize = 64

interface Entry {
  operation: Operation | null
  left: number
  right: number
  /** Known before any reading is seen. */
  constant: number | null
}

export class Tape {
  private readonly entries: Entry[] = []
  private readonly known = new Map<string, number>()

  /** @param inputs number of values given for each reading: predictors, then parameters */
  constructor(readonly inputs: number) {
    for (let i = 0; i < inputs; i++) this.entries.push({ operation: null, left: i, right: -1, constant: null })
  }

  get length(): number {
    return this.entries.length
  }

  constant(value: number): number {
    return this.remember(`constant ${Object.is(value, -0) ? '-0' : value}`, { operation: null, left: -1, right: -1, constant: value })
  }

  constantAt(place: number): number | null {
    return this.entries[place]!.constant
  }

  apply(operation: Operation, left: number, right = left): number {
    const a = this.constantAt(left)
    const b = this.constantAt(right)
    if (a !== null && b !== null) return this.constant(operations[operation].value(a, b))
    return this.simplified(operation, left, right, a, b)
      ?? this.remember(`${operation} ${left} ${right}`, { operation, left, right, constant: null })
  }

  private simplified(operation: Operation, left: number, right: number, a: number | null, b: number | null): number | null {
    switch (operation) {
      case 'add': return a === 0 ? right : b === 0 ? left : null
      case 'subtract': return b === 0 ? left : left === right ? this.constant(0) : null
      case 'multiply': return a === 0 || b === 0 ? this.constant(0) : a === 1 ? right : b === 1 ? left : null
      case 'divide': return a === 0 ? this.constant(0) : b === 1 ? left : null
      case 'power': return b === 1 ? left : b === 0 ? this.constant(1) : null
      default: return null
    }
  }

  private remember(key: string, entry: Entry): number {
    const place = this.known.get(key)
    if (place !== undefined) return place
    this.entries.push(entry)
    this.known.set(key, this.entries.length - 1)
    return this.entries.length - 1
  }

  /** Appends ∂(entry at `place`)/∂(input) and says where it stands. */
  derivative(place: number, input: number): number {
    const zero = this.constant(0)
    const slopes: number[] = []
    for (let at = 0; at <= place; at++) {
      const { operation, left, right } = this.entries[at]!
      if (operation === null) slopes.push(at === input ? this.constant(1) : zero)
      else slopes.push(operations[operation].slope(this, left, right, at, slopes[left]!, slopes[right]!))
    }
    return slopes[place]!
  }

  /** Room for one block of readings. */
  workspace(): Float64Array {
    const room = new Float64Array(this.length * blockSize)
    this.entries.forEach(({ constant }, at) => {
      if (constant !== null) room.fill(constant, at * blockSize, (at + 1) * blockSize)
    })
    return room
  }

  /** Carries `count` readings, whose inputs stand in the first rows of the workspace, through the list. */
  run(room: Float64Array, count: number, upTo = this.length - 1): void {
    for (let at = this.inputs; at <= upTo; at++) {
      const { operation, left, right } = this.entries[at]!
      if (operation !== null) operations[operation].block(room, left * blockSize, right * blockSize, at * blockSize, count)
    }
  }
}
