// s3rver brings no types; these are the parts the stand-in uses.
declare module 's3rver' {
  interface Options {
    address: string
    port: number
    directory: string
    silent: boolean
    vhostBuckets: boolean
    configureBuckets: { name: string }[]
  }
  export default class S3rver {
    constructor(options: Options)
    run(): Promise<{ port: number }>
    close(): Promise<void>
  }
}

declare module 's3rver/lib/models/account.js' {
  interface Account {
    createKeyPair(id: string, secret: string): void
    revokeAccessKey(id: string): void
  }
  const account: { DUMMY_ACCOUNT: Account }
  export default account
}
