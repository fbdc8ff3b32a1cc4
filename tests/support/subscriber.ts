import { randomUUID } from "node:crypto"
import type Stripe from "stripe"
import { asWorker, type Role } from "@/db"
import type { Ctx } from "@/lib/context"
import { newId } from "@/lib/id"
import { clientOf } from "../fakes/stripe/subject"
import { createTestAccount, type TestAccount } from "./account"
import { stack } from "./stack"

export interface Subscriber extends TestAccount {
  readonly email: string
  /** The account as its owner, or another role, acts in it at this moment. */
  as(role: Role): Ctx
}

/** An account, on the free plan if nothing is said, with an owner whom mails reach. Call `takeSettings` first. */
export async function createSubscriber(
  options: Parameters<typeof createTestAccount>[0] = { plan: "nano" },
): Promise<Subscriber> {
  const account = await createTestAccount(options)
  const user_id = newId("user")
  const email = `${randomUUID()}@fernhollow.test`
  await asWorker(async (trx) => {
    await trx.insertInto("app_user").values({ id: user_id, email, name: "Ada" }).execute()
    await trx
      .insertInto("membership")
      .values({ account_id: account.ctx.account_id, user_id, role: "owner" })
      .execute()
  })
  const as = (role: Role): Ctx => ({
    ...account.ctx,
    actor: { kind: "user", id: user_id, role },
    now: new Date(),
  })
  return { ...account, email, as }
}

/** The SDK as it is, pointed at the stand-in of the stack under test. */
export function standInClient(): Stripe {
  return clientOf(stack().stripeFakeUrl, stack().settings.STRIPE_SECRET_KEY)
}

export interface Visit {
  readonly status: number
  /** Where a redirect leads. */
  readonly location: string | null
  readonly text: string
}

/** Opens a hosted page, or posts a form to it, as a browser would; redirects are told and not followed. */
export async function visit(url: string, form?: Record<string, string>): Promise<Visit> {
  const answer = await fetch(url, {
    redirect: "manual",
    ...(form && {
      method: "POST",
      body: new URLSearchParams(form),
      headers: { origin: new URL(url).origin },
    }),
  })
  return { status: answer.status, location: answer.headers.get("location"), text: await answer.text() }
}

/** Asks again until the answer is no longer undefined or false; fails after `within_ms`. */
export async function until<T>(ask: () => Promise<T | undefined | false>, within_ms = 20_000): Promise<T> {
  const giveUp = Date.now() + within_ms
  for (;;) {
    const answer = await ask()
    if (answer !== undefined && answer !== false) return answer
    if (Date.now() > giveUp) throw new Error(`Not so within ${within_ms} ms`)
    await new Promise((resolve) => setTimeout(resolve, 100))
  }
}
