/** Failures to reach a server, by Node's names. */
const network = new Set(['ECONNREFUSED', 'ECONNRESET', 'EPIPE', 'ETIMEDOUT', 'ENOTFOUND', 'EHOSTUNREACH'])

/**
 * Whether an error says that PostgreSQL is away, and not that a query is wrong: a network failure, a connection exception
 * (class 08), or a server that stops or starts (57P01 to 57P03).
 *
 * @source PostgreSQL documentation, appendix A, error codes
 */
export function isOutage(error: unknown): boolean {
  if (!(error instanceof Error)) return false
  const code = 'code' in error && typeof error.code === 'string' ? error.code : ''
  return network.has(code) || code.startsWith('08') || /^57P0[1-3]$/.test(code) || /^Connection terminated/.test(error.message)
}
