import { createServer } from 'node:http'
import S3rver from 's3rver'
import accounts from 's3rver/lib/models/account.js'
import { required } from './settings.mjs'

// The local stand-in for S3-compatible storage: the same protocol, files in a folder, loopback only.
const keyId = required('S3_ACCESS_KEY_ID')
accounts.DUMMY_ACCOUNT.createKeyPair(keyId, required('S3_SECRET_ACCESS_KEY'))

const store = new S3rver({
  directory: required('STANDIN_FOLDER'),
  silent: true,
  vhostBuckets: false,
  configureBuckets: [{ name: required('S3_BUCKET') }],
})
await store.configureBuckets()
const answer = store.callback()

// The stand-in checks no signatures, and any account of this machine reaches loopback: the key's random id lets us in.
const server = createServer((request, response) => {
  if (request.headers.authorization?.includes(`Credential=${keyId}/`)) return answer(request, response)
  response.writeHead(403).end()
})
server.listen(Number(required('STANDIN_PORT')), '127.0.0.1')

process.on('SIGTERM', () => {
  server.close(() => process.exit(0))
  server.closeAllConnections()
})
