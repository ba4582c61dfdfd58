import { rememberedPort } from './ports.mjs'
import { secretsOf } from './secrets.mjs'

const BUCKET = 'anionary'

/**
 * @typedef {object} Address
 * @property {string} host
 * @property {number} port
 */

/** Where the web server listens: PORT (default 3000) on loopback, unless ANIONARY_HOST says otherwise. @returns {Address} */
export function webAddress() {
  return { host: process.env.ANIONARY_HOST || '127.0.0.1', port: Number(process.env.PORT || 3000) }
}

/**
 * Settings of file storage and mail: real services where the environment names them, else the stand-ins.
 * @param {string} data
 */
export async function serviceSettings(data) {
  const { S3_ENDPOINT, SMTP_URL } = process.env
  const secrets = secretsOf(data)
  const objectsPort = S3_ENDPOINT ? null : await rememberedPort(data, 'objects')
  const mailPort = SMTP_URL ? null : await rememberedPort(data, 'mail')
  const objects = objectsPort
    ? { S3_ENDPOINT: `http://127.0.0.1:${objectsPort}`, S3_BUCKET: BUCKET, S3_ACCESS_KEY_ID: secrets.objectStoreKeyId, S3_SECRET_ACCESS_KEY: secrets.objectStoreKey }
    : {}
  const mail = mailPort ? { SMTP_URL: `smtp://127.0.0.1:${mailPort}` } : {}
  return { objectsPort, mailPort, env: /** @type {Record<string, string>} */ ({ ...objects, ...mail }) }
}

/**
 * Settings of the web server and the worker that no service brings. What the environment sets wins.
 * @param {string} data @param {Address} address
 */
export function appSettings(data, { host, port }) {
  const isLoopback = host === '127.0.0.1' || host === 'localhost' || host === '::1'
  const url = process.env.ANIONARY_URL || `http://${host}:${port}`
  return {
    NODE_ENV: 'production',
    // The storage client announces when it will stop supporting this Node.js, at every start.
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    HOST: host,
    PORT: String(port),
    ANIONARY_URL: url,
    ANIONARY_DEMO: process.env.ANIONARY_DEMO || '1',
    NUXT_SESSION_PASSWORD: process.env.NUXT_SESSION_PASSWORD || secretsOf(data).sessionPassword,
    // Browsers send a Secure cookie over https alone.
    NUXT_SESSION_COOKIE_SECURE: process.env.NUXT_SESSION_COOKIE_SECURE || String(!(isLoopback && url.startsWith('http:'))),
  }
}
