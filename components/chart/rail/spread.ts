import type { Span } from './scale'

interface Block {
  mean: number
  size: number
}

/** Non-decreasing values nearest to the given ones in the sum of squares, by pooling neighbours that stand in the wrong order. */
function isotonic(values: readonly number[]): number[] {
  const blocks: Block[] = []
  for (const value of values) {
    let block: Block = { mean: value, size: 1 }
    let before = blocks.at(-1)
    while (before && before.mean > block.mean) {
      blocks.pop()
      const size = before.size + block.size
      block = { mean: (before.mean * before.size + block.mean * block.size) / size, size }
      before = blocks.at(-1)
    }
    blocks.push(block)
  }
  return blocks.flatMap(({ mean, size }) => Array<number>(size).fill(mean))
}

/**
 * Moves places apart by as little as possible (least squares), keeping their order.
 *
 * @param wanted where each would like to sit, in the order they must keep [px]
 * @param gaps least distance to the next: one for all, or one between each pair of neighbours [px]
 * @param within the stretch to stay in [px]; when it is too short, they start at its first end and run over the second
 */
export function spread(wanted: readonly number[], gaps: number | readonly number[], within: Span = [-Infinity, Infinity]): number[] {
  const offsets = [0]
  for (let index = 1; index < wanted.length; index++) {
    offsets.push(offsets[index - 1]! + (typeof gaps === 'number' ? gaps : gaps[index - 1]!))
  }
  const highest = Math.max(within[0], within[1] - offsets.at(-1)!)
  const free = isotonic(wanted.map((place, index) => place - offsets[index]!))
  return free.map((place, index) => Math.min(Math.max(place, within[0]), highest) + offsets[index]!)
}
