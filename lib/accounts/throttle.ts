import { sql } from "kysely"
import type { Trx } from "@/db"
import { TarnwrightError } from "@/lib/errors"
import { rateLimiter } from "@/lib/usage"
import type { Visitor } from "./person"

// @source PLATFORM 5.6: 5 tries for an address from a place, then a wait that doubles up to 15 minutes; 50 failures
// in 10 minutes from a place; 100 in a row for an address, after which only a letter opens it (NIST SP 800-63B-4).
const freeTries = 5
const firstWait_s = 10
const longestWait_s = 15 * 60
const placeLimit = 50
const placeWindow_s = 10 * 60
const addressLimit = 100

/**
 * Admits one more try to sign in and counts it as failed, until {@link forgetFailures} is told otherwise: a try that
 * is counted first cannot be made a hundred times at once.
 *
 * @throws TarnwrightError `rate_limited`, with the seconds to wait.
 */
export async function admitTry(trx: Trx, visitor: Visitor, email: string): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${email}, 0))`.execute(trx)
  const place = visitor.ip ?? ""
  const address = await trx
    .selectFrom("sign_in_failure")
    .select((select) => [
      select.fn.countAll<number>().as("all"),
      select.fn.countAll<number>().filterWhere("ip", "=", place).as("here"),
      select.fn.max("at").filterWhere("ip", "=", place).as("last_here"),
    ])
    .where("email", "=", email)
    .executeTakeFirstOrThrow()
  if (address.all >= addressLimit) {
    throw new TarnwrightError(
      "rate_limited",
      "Too many failed tries for this address. Set a new password by e-mail to open it again.",
    )
  }
  if (address.here >= freeTries && address.last_here) {
    const wait_s = Math.min(longestWait_s, firstWait_s * 2 ** (address.here - freeTries))
    refuseUntil(new Date(address.last_here.getTime() + wait_s * 1000), visitor.now)
  }
  const fromHere = await trx
    .selectFrom("sign_in_failure")
    .select((select) => [select.fn.countAll<number>().as("count"), select.fn.min("at").as("first")])
    .where("ip", "=", place)
    .where("at", ">", new Date(visitor.now.getTime() - placeWindow_s * 1000))
    .executeTakeFirstOrThrow()
  if (fromHere.count >= placeLimit && fromHere.first) {
    refuseUntil(new Date(fromHere.first.getTime() + placeWindow_s * 1000), visitor.now)
  }
  await trx.insertInto("sign_in_failure").values({ email, ip: place, at: visitor.now }).execute()
}

/** Forgets the failures of an address: someone signed in, or proved by letter that the address is theirs. */
export async function forgetFailures(trx: Trx, email: string): Promise<void> {
  await trx.deleteFrom("sign_in_failure").where("email", "=", email).execute()
}

// Nobody fills another's mailbox through us, or asks for a thousand accounts.
const letters = { points: 5, window_s: 3600 }
const lettersFromHere = { points: 100, window_s: 3600 }

/** Whether one more letter may go to an address that has not proved who it is. The visitor is not told. */
export async function mayWriteTo(email: string, visitor: Visitor): Promise<boolean> {
  const limiter = rateLimiter()
  const [address, place] = await Promise.all([
    limiter.take(`letter-to:${email}`, letters),
    limiter.take(`letter-from:${visitor.ip ?? ""}`, lettersFromHere),
  ])
  return address.allowed && place.allowed
}

function refuseUntil(until: Date, now: Date): void {
  const wait_s = Math.ceil((until.getTime() - now.getTime()) / 1000)
  if (wait_s <= 0) return
  const words = wait_s < 90 ? `${wait_s} seconds` : `${Math.ceil(wait_s / 60)} minutes`
  throw new TarnwrightError("rate_limited", `Too many failed tries. Wait ${words}, or set a new password.`, {
    retryAfterS: wait_s,
  })
}
