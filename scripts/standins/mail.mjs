import { randomUUID } from 'node:crypto'
import { renameSync } from 'node:fs'
import { writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { SMTPServer } from 'smtp-server'
import { required } from './settings.mjs'

// The local stand-in for a mail server: takes mail over SMTP on loopback and keeps each message as a file.
const folder = required('STANDIN_FOLDER')

/** @param {AsyncIterable<Buffer>} stream */
async function keep(stream) {
  const chunks = []
  for await (const chunk of stream) chunks.push(chunk)
  const file = join(folder, `${new Date().toISOString().replaceAll(':', '-')}-${randomUUID().slice(0, 8)}.eml`)
  await writeFile(`${file}.part`, Buffer.concat(chunks))
  renameSync(`${file}.part`, file)
}

const server = new SMTPServer({
  disabledCommands: ['AUTH', 'STARTTLS'],
  disableReverseLookup: true,
  size: 25_000_000,
  onData: (stream, _session, done) => {
    keep(stream).then(() => done(), done)
  },
})
server.listen(Number(required('STANDIN_PORT')), '127.0.0.1')

process.on('SIGTERM', () => server.close(() => process.exit(0)))
