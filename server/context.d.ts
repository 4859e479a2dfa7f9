declare module 'h3' {
  interface H3EventContext {
    requestId: string
    nonce: string
  }
}

export {}
