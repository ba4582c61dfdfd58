import { readFile, readdir } from 'node:fs/promises'
import { join } from 'node:path'
import { v7 as uuid } from 'uuid'
import { describe, expect, it } from 'vitest'
import { sendMail } from '~~/server/utils/mail'
import { running } from '../support/running'

describe('sendMail', () => {
  it('delivers over SMTP; the stand-in keeps the message as a file', async () => {
    const subject = `Invitation ${uuid()}`
    await sendMail({ to: 'wren@ostrel.example', subject, text: 'Cloud points: 31.0 °C ± 0.1 K' })
    const folder = join(running.data, 'mail')
    const messages = await Promise.all((await readdir(folder)).map(file => readFile(join(folder, file), 'utf8')))
    const message = messages.find(text => text.includes(subject))
    expect(message).toMatch(/^To: wren@ostrel\.example$/m)
    expect(message).toMatch(/^From: Anionary </m)
  })

  it('fails aloud when the server refuses', async () => {
    await expect(sendMail({ to: '', subject: 'Nobody', text: 'To nobody' })).rejects.toThrow()
  })
})
