const spaces = /[\u00A0\u2000-\u200A\u202F\u205F\u3000]/g
const invisible = /[\u200B-\u200D\u2060\uFEFF]/g
const isPlain = /^[\x21-\x7E]*$/

/** A cell as it is read: every kind of space is a space, a true minus is a hyphen, nothing stands around it. */
export function tidy(text: string): string {
  if (isPlain.test(text)) return text
  return text.replace(invisible, '').replace(spaces, ' ').replace(/[\u2212\uFE63\uFF0D]/g, '-').replace(/\s+/g, ' ').trim()
}

const letters: Readonly<Record<string, string>> = { ß: 'ss', ø: 'o', æ: 'ae', œ: 'oe', đ: 'd', ł: 'l' }
const folded = new Map<string, string>()
const longestRemembered = 100
const mostRemembered = 5_000

/** A word as it is compared: small letters without accents. Remembered, because tables repeat themselves. */
export function fold(text: string): string {
  const known = folded.get(text)
  if (known !== undefined) return known
  const result = foldAnew(text)
  if (text.length > longestRemembered) return result
  if (folded.size > mostRemembered) folded.clear()
  folded.set(text, result)
  return result
}

function foldAnew(text: string): string {
  return tidy(text).toLowerCase().normalize('NFD').replace(/[\u0300-\u036F]/g, '').replace(/[ßøæœđł]/g, letter => letters[letter] ?? letter)
}
