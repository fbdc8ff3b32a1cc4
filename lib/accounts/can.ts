import type { Role } from "@/db"
import type { Actor } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"

/** How far a right reaches: everything of the account, or what the person made or did themselves. */
export type Reach = "all" | "own"

type Party = Role | "admin"

/**
 * Who may do what: the one table that routes, pages and menus read. What is not in it is refused.
 *
 * @source PLATFORM 5.9
 */
const rights = {
  "account.read": { owner: "all", developer: "all", merchandiser: "all", viewer: "all", admin: "all" },
  "account.manage": { owner: "all" },
  "team.read": { owner: "all", developer: "all", merchandiser: "all", viewer: "all" },
  "team.manage": { owner: "all" },
  "billing.read": { owner: "all", viewer: "all", admin: "all" },
  "billing.manage": { owner: "all" },
  "key.read": { owner: "all", developer: "all", admin: "all" },
  "key.create": { owner: "all", developer: "all" },
  "key.rotate": { owner: "all", developer: "all" },
  "key.revoke": { owner: "all", developer: "all", admin: "all" },
  "explorer.use": { owner: "all", developer: "all" },
  "usage.read": { owner: "all", developer: "all", viewer: "all", admin: "all" },
  "widget.read": { owner: "all", developer: "all", merchandiser: "all", admin: "all" },
  "widget.manage": { owner: "all", developer: "all", merchandiser: "all" },
  "request.read": { owner: "all", developer: "all" },
  "bench.use": { owner: "all", developer: "all", merchandiser: "all", viewer: "all" },
  "report.read": { owner: "all", developer: "all", merchandiser: "all", viewer: "all" },
  // Counter staff may be viewers: they hand over sheets, and answer for their own alone.
  "report.create": { owner: "all", developer: "all", merchandiser: "all", viewer: "all" },
  "report.manage": { owner: "all", developer: "all", merchandiser: "all", viewer: "own" },
  "catalog.read": { owner: "all", developer: "all", merchandiser: "all", viewer: "all" },
  "catalog.manage": { owner: "all", developer: "all", merchandiser: "all" },
  // Shoppers' personal data: PLATFORM 5.9 gives it to owners and merchandisers, its export to owners, admins never.
  "enquiry.read": { owner: "all", merchandiser: "all" },
  "enquiry.erase": { owner: "all", merchandiser: "all" },
  "enquiry.export": { owner: "all" },
  "insight.read": { owner: "all", developer: "all", merchandiser: "all", viewer: "all" },
  "webhook.read": { owner: "all", developer: "all", admin: "all" },
  "webhook.manage": { owner: "all", developer: "all" },
  "audit.read": { owner: "all", developer: "own", admin: "all" },
  "platform.manage": { admin: "all" },
} as const satisfies Record<string, Partial<Record<Party, Reach>>>

export type Right = keyof typeof rights

/** How far the actor's right reaches; undefined when there is none. The system and its jobs may do everything. */
export function reachOf(actor: Actor, right: Right): Reach | undefined {
  if (actor.kind === "system") return "all"
  if (actor.kind === "key") return undefined
  const party: Party = actor.kind === "admin" ? "admin" : actor.role
  return (rights[right] as Partial<Record<Party, Reach>>)[party]
}

/** Whether the actor may do this: at all, or to the one thing whose maker is `resource.by`. */
export function can(actor: Actor, right: Right, resource?: { readonly by: string | null }): boolean {
  const reach = reachOf(actor, right)
  if (reach === undefined) return false
  return reach === "all" || resource === undefined || resource.by === actor.id
}

/** @throws TarnwrightError `forbidden` when the actor may not do this. */
export function authorize(actor: Actor, right: Right, resource?: { readonly by: string | null }): void {
  if (!can(actor, right, resource)) {
    const who = actor.kind === "user" ? `a ${actor.role}` : `this ${actor.kind}`
    throw new TarnwrightError("forbidden", `Your role in this account, ${who}, does not allow this.`)
  }
}
