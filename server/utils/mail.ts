import { createTransport, type Transporter } from 'nodemailer'
import { config } from './config'

export interface Mail {
  to: string
  subject: string
  /** Plain words: every mail can be read without HTML. */
  text: string
  html?: string
}

let transport: Transporter | undefined

/** Hands a mail to the server that SMTP_URL names. @throws when that server does not take it */
export async function sendMail(mail: Mail): Promise<void> {
  const { SMTP_URL, MAIL_FROM } = config()
  transport ??= createTransport(SMTP_URL)
  await transport.sendMail({ from: MAIL_FROM, ...mail })
}
