// s3rver brings no types; these are the parts the stand-in uses.
declare module 's3rver' {
  import type { RequestListener } from 'node:http'

  interface Options {
    directory: string
    silent: boolean
    vhostBuckets: boolean
    configureBuckets: { name: string }[]
  }
  export default class S3rver {
    constructor(options: Options)
    configureBuckets(): Promise<void>
    callback(): RequestListener
  }
}

declare module 's3rver/lib/models/account.js' {
  const accounts: { DUMMY_ACCOUNT: { createKeyPair(id: string, secret: string): void } }
  export default accounts
}
