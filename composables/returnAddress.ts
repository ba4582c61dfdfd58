const here = 'http://here.invalid'

/** Where to go after signing in: only to a page of this site, whatever was asked. */
export function returnAddress(asked: unknown): string {
  const usual = '/projects'
  if (typeof asked !== 'string' || !asked.startsWith('/') || !URL.canParse(asked, here)) return usual
  const { origin, pathname, search, hash } = new URL(asked, here)
  return origin === here ? pathname + search + hash : usual
}
