import "server-only"
import { cookies, headers } from "next/headers"
import { forbidden, notFound, redirect } from "next/navigation"
import { cache } from "react"
import {
  can,
  findMembership,
  type Membership,
  type Person,
  type ReadSession,
  type Right,
  readSession,
} from "@/lib/accounts"
import type { Actor, Ctx } from "@/lib/context"
import { sessionCookieName } from "./session-cookie"
import { visitorOf } from "./visitor"

// next-auth sets and clears the cookie. Reading it here and not through next-auth leaves the cookie alone, which a
// page could not write, and costs one query.

/** The session of whoever asks; undefined when nobody is signed in. */
export const currentSession = cache(async (): Promise<ReadSession | undefined> => {
  const cookie = (await cookies()).get(sessionCookieName())
  return readSession(cookie?.value, new Date())
})

/** The session of who is signed in; whoever is not goes to the sign-in page and comes back here. */
export async function openSelf(path: string): Promise<ReadSession> {
  const session = await currentSession()
  if (!session) redirect(`/signin?next=${encodeURIComponent(path)}`)
  return session
}

/** The person who is signed in; otherwise as {@link openSelf}. */
export async function signedIn(path: string): Promise<Person> {
  return (await openSelf(path)).person
}

/** What a page of an account works with. */
export interface OpenAccount extends Membership {
  readonly person: Person
  /** Whether the person has set a second factor up. */
  readonly second_factor: boolean
  readonly actor: Actor
  readonly ctx: Ctx
}

/** A person's place in the account of an address. One who has none there sees what they would see if it did not exist. */
export const openAccount = cache(async (slug: string): Promise<OpenAccount> => {
  const { person, second_factor } = await openSelf(`/portal/${slug}`)
  const membership = await findMembership({ user_id: person.id, slug })
  if (!membership) notFound()
  const actor: Actor = { kind: "user", id: person.id, role: membership.role }
  const { ip, now, request_id } = await visitor()
  return {
    ...membership,
    person,
    second_factor,
    actor,
    ctx: { account_id: membership.account.id, actor, ip, now, request_id },
  }
})

/** As {@link openAccount}, for a page that needs a right; without it the page answers 403 and says so. */
export async function openAccountFor(
  right: Right,
  params: Promise<{ account: string }>,
): Promise<OpenAccount> {
  const opened = await openAccount((await params).account)
  if (!can(opened.actor, right)) forbidden()
  return opened
}

/** The platform's admin, who sets a second factor up before anything else; for anyone else there is no such area. */
export const openAdmin = cache(async (): Promise<{ person: Person; actor: Actor }> => {
  const { person, second_factor } = await openSelf("/admin")
  if (!person.is_admin) notFound()
  if (!second_factor) redirect("/person/second-factor?next=/admin")
  return { person, actor: { kind: "admin", id: person.id } }
})

async function visitor() {
  const received = await headers()
  return visitorOf((name) => received.get(name))
}
