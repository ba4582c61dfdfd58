import { describe, expect, it } from 'vitest'
import { returnAddress } from '~~/composables/returnAddress'

describe('returnAddress', () => {
  it.each(['/projects/1/series?show=all#top', '/', '/docs/api'])('leads back to %s', (asked) => {
    expect(returnAddress(asked)).toBe(asked)
  })

  it.each(['//evil.example', '/\\evil.example', '/\t/evil.example', '/\n/evil.example', 'https://evil.example', 'javascript:alert(1)', 'projects', '', undefined, ['/a'], '/\r\\evil.example'])('leads %j nowhere but to the projects', (asked) => {
    expect(returnAddress(asked)).toBe('/projects')
  })
})
