/** A day in words, in UTC so that server and browser write the same. */
export function dayInWords(instant: string): string {
  return new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' }).format(new Date(instant))
}
