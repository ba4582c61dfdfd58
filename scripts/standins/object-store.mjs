import S3rver from 's3rver'
import accounts from 's3rver/lib/models/account.js'
import { required } from './settings.mjs'

// The local stand-in for S3-compatible storage: the same protocol, files in a folder, loopback only.
// Its built-in key is public knowledge: only this folder's own key opens it.
accounts.DUMMY_ACCOUNT.revokeAccessKey('S3RVER')
accounts.DUMMY_ACCOUNT.createKeyPair(required('S3_ACCESS_KEY_ID'), required('S3_SECRET_ACCESS_KEY'))

const server = new S3rver({
  address: '127.0.0.1',
  port: Number(required('STANDIN_PORT')),
  directory: required('STANDIN_FOLDER'),
  silent: true,
  vhostBuckets: false,
  configureBuckets: [{ name: required('S3_BUCKET') }],
})
await server.run()

process.on('SIGTERM', () => server.close().finally(() => process.exit(0)))
