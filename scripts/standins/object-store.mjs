import { createRequire } from 'node:module'
import { required } from './settings.mjs'

// The local stand-in for S3-compatible storage: the same protocol, files in a folder, loopback only.
const require = createRequire(import.meta.url)
const S3rver = require('s3rver')
const { DUMMY_ACCOUNT } = require('s3rver/lib/models/account')

// Its built-in key is public knowledge: only this folder's own key opens it.
DUMMY_ACCOUNT.revokeAccessKey('S3RVER')
DUMMY_ACCOUNT.createKeyPair(required('S3_ACCESS_KEY_ID'), required('S3_SECRET_ACCESS_KEY'))

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
