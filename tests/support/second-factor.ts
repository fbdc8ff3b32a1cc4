import { setTimeout as pause } from "node:timers/promises"
import { Secret, TOTP } from "otpauth"
import { asWorker } from "@/db"
import { unseal } from "@/lib/seal"

const period_s = 30

/** The code that an authenticator app shows for a secret, `shift` steps from now. */
export function codeOf(secret: string, shift = 0): string {
  const totp = new TOTP({ secret: Secret.fromBase32(secret.replace(/\s/g, "")) })
  return totp.generate({ timestamp: Date.now() + shift * period_s * 1000 })
}

/**
 * A code of a person's second factor that was not used yet, as soon as there is one: each counts once, and tests sign
 * in more often than every 30 seconds. Call `takeSettings` first.
 */
export async function nextCodeOf(email: string): Promise<string> {
  const { id, seed, last_step } = await asWorker((trx) =>
    trx
      .selectFrom("second_factor")
      .innerJoin("app_user", "app_user.id", "second_factor.user_id")
      .select(["app_user.id", "seed", "last_step"])
      .where("app_user.email", "=", email)
      .executeTakeFirstOrThrow(),
  )
  const step = () => Math.floor(Date.now() / 1000 / period_s)
  while (last_step >= step() + 1) await pause(500)
  return codeOf(unseal(seed, `second_factor:${id}`), last_step >= step() ? 1 : 0)
}
