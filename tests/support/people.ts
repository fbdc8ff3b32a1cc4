import { randomUUID } from "node:crypto"
import { asWorker, type Role } from "@/db"
import { hashPassword, type Person, type Visitor } from "@/lib/accounts"
import type { Ctx } from "@/lib/context"
import { newId } from "@/lib/id"

/** The password of everyone whom a test makes. */
export const PASSWORD = "tarn moss valve lantern"

export function newAddress(): string {
  return `guest-${randomUUID().slice(0, 13)}@fernhollow.test`
}

/** A visitor of its own place, so that no test throttles another. */
export function visitor(shift_ms = 0, ip = `2001:db8::${randomUUID().slice(0, 4)}`): Visitor {
  return { now: new Date(Date.now() + shift_ms), ip, user_agent: "test" }
}

/** A person with a confirmed address, in no account. Call `takeSettings` first. */
export async function createPerson(options: { is_admin?: boolean } = {}): Promise<Person> {
  const is_admin = options.is_admin ?? false
  const person: Person = { id: newId("user"), email: newAddress(), name: "Guest", is_admin }
  const password_hash = await hashPassword(PASSWORD)
  await asWorker((trx) =>
    trx
      .insertInto("app_user")
      .values({ ...person, password_hash, email_verified_at: new Date() })
      .execute(),
  )
  return person
}

/** A new person who belongs to an account, and the context in which they act there. */
export async function createMember(account_id: string, role: Role): Promise<{ person: Person; ctx: Ctx }> {
  const person = await createPerson()
  await asWorker((trx) =>
    trx.insertInto("membership").values({ account_id, user_id: person.id, role }).execute(),
  )
  return { person, ctx: { account_id, actor: { kind: "user", id: person.id, role }, now: new Date() } }
}
