declare module '#auth-utils' {
  /** What the sealed cookie holds: the session's random token and nothing else. */
  interface SecureSessionData {
    token: string
  }
}

export {}
