import { describe, expect, it } from 'vitest'
import { isOutage } from '~~/server/utils/outage'

const withCode = (code: string) => Object.assign(new Error('from the driver'), { code })

describe('isOutage', () => {
  it.each(['ECONNREFUSED', 'ECONNRESET', '08006', '57P01', '57P03'])('takes %s for a database that is away', (code) => {
    expect(isOutage(withCode(code))).toBe(true)
  })

  it('knows a connection that ended under a query, which carries no code', () => {
    expect(isOutage(new Error('Connection terminated unexpectedly'))).toBe(true)
  })

  it.each(['23505', '42501', '57014', ''])('takes %j for a fault of the query', (code) => {
    expect(isOutage(withCode(code))).toBe(false)
  })

  it('says nothing of what is no error', () => {
    expect(isOutage('ECONNREFUSED')).toBe(false)
  })
})
