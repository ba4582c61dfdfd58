const day = 86_400_000
const startOf = (instant: Date) => Math.floor(instant.getTime() / day)
const written = (instant: Date, options: Intl.DateTimeFormatOptions) => new Intl.DateTimeFormat('en-GB', { ...options, timeZone: 'UTC' }).format(instant)

/** A past day as people say it: today, yesterday, Wednesday, 4 March, 4 March 2025. Days are those of UTC. */
export function dayAgo(instant: string, now: Date): string {
  const then = new Date(instant)
  const days = startOf(now) - startOf(then)
  if (days <= 0) return 'today'
  if (days === 1) return 'yesterday'
  if (days < 7) return written(then, { weekday: 'long' })
  const isThisYear = then.getUTCFullYear() === now.getUTCFullYear()
  return written(then, { day: 'numeric', month: 'long', ...(!isThisYear && { year: 'numeric' }) })
}
