import { getRequestIP, type H3Event } from 'h3'
import { config } from './config'

/** The network address that asks. A proxy's word is taken only where ANIONARY_TRUST_PROXY=1 says that there is one. */
export function addressOf(event: H3Event): string {
  return getRequestIP(event, { xForwardedFor: config().ANIONARY_TRUST_PROXY }) ?? 'unknown'
}
