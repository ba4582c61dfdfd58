import { z } from 'zod'

/** What every web server and worker is told from outside; docs/operations.md holds the table. */
export type Config = z.infer<typeof settings>

/** All settings that are wrong, one sentence each. */
export class ConfigError extends Error {
  override name = 'ConfigError'
  constructor(readonly problems: readonly string[]) {
    super(`Anionary cannot start, ${problems.length} setting(s) need a change:\n${problems.map(problem => `  ${problem}`).join('\n')}`)
  }
}

const flag = z.enum(['true', 'false', '1', '0']).transform(value => value === 'true' || value === '1')
const url = (...protocols: string[]) => z.string({ error: 'is not set' })
  .refine(value => URL.canParse(value) && protocols.includes(new URL(value).protocol), `must be an address that begins with ${protocols.join(' or ')}//`)
const text = z.string({ error: 'is not set' })

const settings = z.object({
  DATABASE_URL: url('postgresql:', 'postgres:'),
  S3_ENDPOINT: url('http:', 'https:'),
  S3_REGION: text.default('us-east-1'),
  S3_BUCKET: text.regex(/^[a-z0-9.-]{3,63}$/, 'must be 3 to 63 lower-case letters, digits, dots or hyphens'),
  S3_ACCESS_KEY_ID: text,
  S3_SECRET_ACCESS_KEY: text,
  SMTP_URL: url('smtp:', 'smtps:'),
  MAIL_FROM: text.default('Anionary <no-reply@anionary.example>'),
  NUXT_SESSION_PASSWORD: text.min(32, 'must have at least 32 characters'),
  NUXT_SESSION_COOKIE_SECURE: flag.default(true),
  ANIONARY_URL: url('http:', 'https:').default('http://127.0.0.1:3000'),
  ANIONARY_DEMO: z.enum(['0', '1'], { error: 'must be 0 or 1' }).default('1').transform(value => value === '1'),
  ANIONARY_PUBLIC_FIT_PER_MINUTE: z.coerce.number({ error: 'must be a whole number' }).int('must be a whole number').min(1, 'must be at least 1').default(120),
  ANIONARY_TRUST_PROXY: flag.default(false),
  LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'fatal', 'silent']).default('info'),
})

const secrets = ['S3_SECRET_ACCESS_KEY', 'NUXT_SESSION_PASSWORD'] as const

/**
 * Reads the settings; an empty one counts as unset.
 *
 * @throws ConfigError with every problem at once
 */
export function readConfig(env: Record<string, string | undefined>): Config {
  const given = Object.fromEntries(Object.entries(env).filter(([, value]) => value !== ''))
  const parsed = settings.safeParse(given)
  const problems = parsed.success ? [] : parsed.error.issues.map(({ path, message }) => `${path.join('.')} ${message}`)
  if (given.ANIONARY_DEMO === '0') problems.push(...defaultSecrets(given))
  if (!parsed.success || problems.length > 0) throw new ConfigError(problems)
  return parsed.data
}

/** Outside the demo, a secret that stands in a manual or a sample file is no secret. */
function defaultSecrets(given: Record<string, string | undefined>): string[] {
  const found: string[] = secrets.filter(name => given[name] && isGuessable(given[name]))
  const database = given.DATABASE_URL ?? ''
  const password = URL.canParse(database) ? new URL(database).password : ''
  if (password && isGuessable(password)) found.push('DATABASE_URL (its password)')
  return found.map(name => `${name} is a default secret: with ANIONARY_DEMO=0 give one of your own, for example from: openssl rand -hex 24`)
}

const fewDistinct = 8

function isGuessable(secret: string): boolean {
  return /anionary|s3rver|change.?me|secret|password|postgres|example/i.test(secret) || new Set(secret).size < fewDistinct
}

let known: Config | undefined

/** This process's settings, read once. @throws ConfigError */
export function config(): Config {
  known ??= readConfig(process.env)
  return known
}
