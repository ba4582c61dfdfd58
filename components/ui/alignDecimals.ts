/**
 * Pads printed numbers on the right so that their decimal points stand in one column when set flush right in a mono
 * face. A number without a point ends where the others have theirs; words and dashes are left alone.
 */
export function alignDecimals(printed: readonly string[]): string[] {
  const tails = printed.map(tail)
  const longest = Math.max(0, ...tails.map(text => text.length))
  return printed.map((text, index) => isNumber(text) ? text + ' '.repeat(longest - (tails[index]?.length ?? 0)) : text)
}

function isNumber(text: string): boolean {
  return /^[+−-]?\d/.test(text)
}

/** What stands from the decimal point on, or after the whole number: .31(18), (29). */
function tail(text: string): string {
  if (!isNumber(text)) return ''
  return /^[+−-]?\d+(.*)$/.exec(text)?.[1] ?? ''
}
