/** A day in words, in UTC so that server and browser write the same. */
export function dayInWords(instant: string): string {
  return new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' }).format(new Date(instant))
}

/** A day and the minute in words, in UTC: 'on 4 March 2026 at 14:02 UTC'. */
export function instantInWords(instant: string): string {
  const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', timeZone: 'UTC' }).format(new Date(instant))
  return `on ${dayInWords(instant)} at ${time} UTC`
}
