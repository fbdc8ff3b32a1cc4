import { accountClosing } from "./account-closing"
import { alreadySignedUp } from "./already-signed-up"
import { enquiryCopy } from "./enquiry-copy"
import { enquiryReceived } from "./enquiry-received"
import { exportReady } from "./export-ready"
import { invitation } from "./invitation"
import { keyExpiring } from "./key-expiring"
import { keyExposed } from "./key-exposed"
import { keyRevoked } from "./key-revoked"
import { membershipChanged } from "./membership-changed"
import { passwordChanged } from "./password-changed"
import { paymentFailed } from "./payment-failed"
import { resetPassword } from "./reset-password"
import { secondFactorChanged } from "./second-factor-changed"
import { sharedReport } from "./shared-report"
import { signInLink } from "./sign-in-link"
import { usageThreshold } from "./usage-threshold"
import { verifyEmail } from "./verify-email"
import { webhookDisabled } from "./webhook-disabled"

/** Every letter that the product sends, by the name that a job carries. */
export const letters = {
  verify_email: verifyEmail,
  already_signed_up: alreadySignedUp,
  reset_password: resetPassword,
  password_changed: passwordChanged,
  second_factor_changed: secondFactorChanged,
  sign_in_link: signInLink,
  export_ready: exportReady,
  account_closing: accountClosing,
  invitation,
  membership_changed: membershipChanged,
  key_revoked: keyRevoked,
  key_expiring: keyExpiring,
  key_exposed: keyExposed,
  usage_threshold: usageThreshold,
  payment_failed: paymentFailed,
  webhook_disabled: webhookDisabled,
  enquiry_received: enquiryReceived,
  enquiry_copy: enquiryCopy,
  shared_report: sharedReport,
} as const

export type LetterName = keyof typeof letters

/** A letter: the name says which `data` it takes. Data is JSON, since it waits in the queue. */
export type Content = {
  [Name in LetterName]: {
    readonly template: Name
    readonly data: Parameters<(typeof letters)[Name]>[0]
  }
}[LetterName]

/** A letter to one address. */
export type Mail = Content & { readonly to: string }
