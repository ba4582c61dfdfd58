/** Where the stack under test listens and what it was started with; `npm test -- api browser` boots it and says so. */
export const running = {
  /** Address of the web server. */
  get url() { return required('ANIONARY_TEST_URL') },
  /** The database as the role that serves. */
  get database() { return required('DATABASE_URL') },
  /** The database as the role that owns and migrates. */
  get ownerDatabase() { return required('DATABASE_OWNER_URL') },
  /** Data folder of the stack: `mail/` holds what was sent. */
  get data() { return required('ANIONARY_DATA') },
}

function required(name: string): string {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is not set: these tests need a running stack, start them with: npm test -- api`)
  return value
}
