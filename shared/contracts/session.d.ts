/** What the sealed cookie holds: who is signed in, and the session that sign-out revokes. */
declare module '#auth-utils' {
  interface User { id: string, name: string }
  interface SecureSessionData { session: string }
}

export {}
