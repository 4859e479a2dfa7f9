export interface SignIn {
  email: string
  role: string
  brewery: string
}

/** What an empty or a demo installation opens with. */
export type Opening = { signIns: SignIn[], password: string } | { code: string, until: Date } | undefined

/** What a person reads once everything runs. */
export function announcement(address: string, opening: Opening): string {
  return [`\nUndercroft runs at ${address}`, ...openingWords(opening), '\nCtrl-C stops it.'].join('\n')
}

function openingWords(opening: Opening): string[] {
  if (opening === undefined) return []
  if ('code' in opening) {
    return ['\nThis installation is empty. Open the address and set it up with this one-time code:', `\n  ${opening.code}\n`, `It is good until ${opening.until.toISOString()}.`]
  }
  if (opening.signIns.length === 0) return []
  const width = Math.max(...opening.signIns.map(({ email }) => email.length))
  return [`\nThe demo is loaded. Sign in with the password ${opening.password} as`, ...opening.signIns.map(({ email, role, brewery }) => `  ${email.padEnd(width)}  ${role}, ${brewery}`)]
}
