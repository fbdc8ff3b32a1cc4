import { alreadySignedUp } from "./already-signed-up"
import { invitation } from "./invitation"
import { keyRevoked } from "./key-revoked"
import { passwordChanged } from "./password-changed"
import { resetPassword } from "./reset-password"
import { usageThreshold } from "./usage-threshold"
import { verifyEmail } from "./verify-email"

/** Every letter that the product sends, by the name that a job carries. */
export const letters = {
  verify_email: verifyEmail,
  already_signed_up: alreadySignedUp,
  reset_password: resetPassword,
  password_changed: passwordChanged,
  invitation,
  key_revoked: keyRevoked,
  usage_threshold: usageThreshold,
} as const

export type LetterName = keyof typeof letters

/** A letter to one address: the name says which `data` it takes. Data is JSON, since it waits in the queue. */
export type Mail = {
  [Name in LetterName]: {
    readonly template: Name
    readonly to: string
    readonly data: Parameters<(typeof letters)[Name]>[0]
  }
}[LetterName]
