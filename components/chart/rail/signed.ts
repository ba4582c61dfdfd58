/** A number with its sign always said, as a shift needs it: +1.03, −0.24, 0.00. */
export function signed(value: number, digits = 2): string {
  const text = Math.abs(value).toFixed(digits)
  if (Number(text) === 0) return text
  return `${value < 0 ? '−' : '+'}${text}`
}
