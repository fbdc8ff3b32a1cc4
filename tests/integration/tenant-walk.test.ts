import { readdirSync, readFileSync } from "node:fs"
import path from "node:path"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { registry } from "@/app/api/v1/registry"
import { asWorker, closePools, type Role, withoutTenant } from "@/db"
import { openSession } from "@/lib/accounts"
import { type AnyOperation, scopes } from "@/lib/api/define-operation"
import { createItem } from "@/lib/catalog"
import { requestExport } from "@/lib/exports"
import { type IdKind, newId } from "@/lib/id"
import { createReport } from "@/lib/reports"
import { invite } from "@/lib/team"
import { createEndpoint, listDeliveries, sendTestEvent } from "@/lib/webhooks"
import { createWidget } from "@/lib/widgets"
import { createMember, newAddress, visitor } from "../support/people"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber, type Subscriber } from "../support/subscriber"

// PLATFORM 5.12: every route, every id, every role, with the ids of another account. The answer is that of an id which
// never existed, word for word. A route or an id that the walk does not know fails it.

const root = path.resolve(import.meta.dirname, "../..")
const roles = ["owner", "developer", "merchandiser", "viewer"] as const

/** Where an id in an address comes from: its kind, and one of the other account. */
const idKinds: Readonly<Record<string, IdKind>> = {
  key_id: "key",
  item_id: "catalog_item",
  report_id: "report",
  enquiry_id: "enquiry",
  endpoint_id: "webhook_endpoint",
  delivery_id: "webhook_delivery",
  widget_id: "widget",
  invitation_id: "invitation",
  export_id: "export",
  user_id: "user",
}

/** What a route wants besides ids, where an empty body would be refused before anybody looked for the id. */
const bodies: Readonly<Record<string, object>> = {
  "POST keys/[key_id]/rotate": { overlap_h: 24 },
  "POST reports/[report_id]/send": { email: "guest@fernhollow.test" },
  "PATCH team/members/[user_id]": { role: "viewer" },
  "PATCH catalog/[item_id]": { name: "Another name" },
  "PATCH webhooks/[endpoint_id]": { events: ["key.revoked"] },
}

interface Route {
  readonly method: string
  /** Below the folder it was read from, as `keys/[key_id]/revoke`. */
  readonly path: string
}

const portalRoutes = routesBelow("app/api/portal/[account]", "route.ts")
const portalPages = routesBelow("app/portal/[account]", "page.tsx")
const adminRoutes = routesBelow("app/api/admin", "route.ts")
/** Of no account: whoever is signed in asks about themselves, or nobody is. */
const ofNoAccount = /^(auth|person|stripe|withdraw|v1|admin|portal\/\[account\])\//

let other: Subscriber
let own: Subscriber
let ownKey: string
const foreign: Record<string, string> = {}
const cookies = {} as Record<Role, string>

beforeAll(async () => {
  takeSettings()
  other = await createSubscriber({ plan: "brand" })
  own = await createSubscriber({ plan: "brand" })
  await fill(other)
  ownKey = (await own.key({ scopes: [...scopes] })).secret
  for (const role of roles) {
    const { person } = await createMember(own.ctx.account_id, role)
    const { token } = await withoutTenant((trx) => openSession(trx, visitor(), person))
    cookies[role] = `tarn-session=${token}`
  }
})

afterAll(closePools)

/** One of each thing that has an id. */
async function fill(account: Subscriber): Promise<void> {
  const ctx = account.as("owner")
  const { key } = await account.key()
  const item = await createItem({
    ctx,
    input: { kind: "filter", name: "Canister", attributes: { max_flow_l_h: 1000, max_head_m: 1.6 } },
  })
  const answer = {
    result: {},
    uncertainty: {},
    cautions: [],
    assumptions: [],
    method: { name: "", version: "", sources: [] },
    input: {},
  }
  const report = await createReport({
    ctx,
    input: { kind: "carbonate_co2", input: {}, answer, charge: () => Promise.resolve() },
  })
  const endpoint = await createEndpoint({
    ctx,
    input: { url: "http://127.0.0.1:9/hook", events: ["key.revoked"] },
  })
  await sendTestEvent({ ctx, input: { endpoint_id: endpoint.id } })
  const [delivery] = await listDeliveries({ ctx, input: { endpoint_id: endpoint.id, limit: 1 } })
  const widget = await createWidget({
    ctx,
    input: { calculator: "co2-level", name: "Level", origins: ["https://shop.example"] },
  })
  const invitation = await invite({ ctx, input: { email: newAddress(), role: "viewer" } })
  const dataExport = await requestExport({ ctx })
  const enquiry_id = newId("enquiry")
  await asWorker((trx) =>
    trx
      .insertInto("enquiry")
      .values({
        account_id: ctx.account_id,
        id: enquiry_id,
        widget_id: widget.id,
        page_origin: "https://shop.example",
        language: "en",
        name: "Guest",
        email: "guest@fernhollow.test",
        message: "Which reactor?",
        tank: null,
        consent_version: "test",
        consent_wording: "test",
        consented_at: ctx.now,
        created_at: ctx.now,
        erased_at: null,
        erased_by: null,
      })
      .execute(),
  )
  Object.assign(foreign, {
    key_id: key.id,
    item_id: item.id,
    report_id: report.id,
    enquiry_id,
    endpoint_id: endpoint.id,
    delivery_id: delivery?.id,
    widget_id: widget.id,
    invitation_id: invitation.id,
    export_id: dataExport.id,
    user_id: ctx.actor.id,
  })
}

describe("the walk", () => {
  it("knows every id in an address, and has one of the other account", () => {
    const names = [...portalRoutes, ...portalPages].flatMap(({ path }) =>
      [...path.matchAll(/\[(\w+)\]/g)].map(([, name]) => name ?? ""),
    )
    const inApi = registry.flatMap(({ path }) =>
      [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name ?? ""),
    )
    expect([...new Set([...names, ...inApi])].filter((name) => !(name in idKinds))).toEqual([])
    expect(Object.keys(idKinds).filter((name) => !foreign[name])).toEqual([])
  })

  it("takes in every route of the application", () => {
    const all = routesBelow("app/api", "route.ts").map(({ path }) => `${path}/`)
    expect(all.filter((each) => !ofNoAccount.test(each))).toEqual([])
    expect(portalRoutes.length).toBeGreaterThan(20)
    expect(portalPages.length).toBeGreaterThan(10)
  })
})

describe("the API", () => {
  const withIds = registry.filter(({ access, path }) => access.kind === "key" && path.includes("{"))

  it.each(withIds.map((operation) => [operation.id, operation] as const))(
    "%s answers for another account's id as for one that never was",
    async (_, operation) => {
      const theirs = await callApi(operation, (name) => foreign[name] ?? "")
      const nobodys = await callApi(operation, never)
      expect(theirs.status).toBe(404)
      expect(theirs).toEqual(nobodys)
    },
  )

  it("lists nothing of another account", async () => {
    const lists = registry.filter(
      ({ access, path, method }) => access.kind === "key" && method === "GET" && !path.includes("{"),
    )
    for (const operation of lists) {
      const { said } = await callApi(operation, never)
      for (const [name, id] of Object.entries(foreign))
        expect(said, `${operation.id} ${name}`).not.toContain(id)
    }
  })
})

describe.each(roles)("a %s of one account, in the portal", (role) => {
  it("finds another account no more than one that never was", async () => {
    for (const route of portalRoutes) {
      const theirs = await callPortal(role, route, other.slug, (name) => foreign[name] ?? "")
      const nobodys = await callPortal(role, route, "no-such-account", never)
      expect(theirs.status, `${route.method} ${route.path}`).toBe(404)
      expect(theirs, `${route.method} ${route.path}`).toEqual(nobodys)
    }
  })

  it("finds another account's things in their own no more than what never was", async () => {
    for (const route of portalRoutes.filter(({ path }) => path.includes("["))) {
      const theirs = await callPortal(role, route, own.slug, (name) => foreign[name] ?? "")
      const nobodys = await callPortal(role, route, own.slug, never)
      expect([403, 404], `${route.method} ${route.path}: ${theirs.said}`).toContain(theirs.status)
      if (role === "owner") expect(theirs.status, `${route.method} ${route.path}: ${theirs.said}`).toBe(404)
      expect(theirs, `${route.method} ${route.path}`).toEqual(nobodys)
    }
  })

  it("sees no page of another account, nor of its things", async () => {
    for (const { path } of portalPages) {
      const page = (slug: string, id: (name: string) => string) =>
        fetch(`${stack().appUrl}/portal/${slug}/${withIds(path, id)}`.replace(/\/$/, ""), {
          headers: { cookie: cookies[role] },
          redirect: "manual",
        })
      const theirs = await page(other.slug, (name) => foreign[name] ?? "")
      expect(theirs.status, path).toBe(404)
      if (!path.includes("[")) continue
      const inOwn = await page(own.slug, (name) => foreign[name] ?? "")
      expect([403, 404], path).toContain(inOwn.status)
      expect(inOwn.status, path).toBe((await page(own.slug, never)).status)
    }
  })

  it("has no admin area", async () => {
    for (const { method, path } of adminRoutes) {
      const response = await fetch(`${stack().appUrl}/api/admin/${withIds(path, never)}`, {
        method,
        headers: { cookie: cookies[role], origin: stack().appUrl, "content-type": "application/json" },
        ...(method !== "GET" && { body: "{}" }),
      })
      expect(response.status, `${method} ${path}`).toBe(404)
    }
  })
})

/** An id of the right form that nothing has. */
function never(name: string): string {
  const kind = idKinds[name]
  return kind ? newId(kind) : "none"
}

function withIds(address: string, id: (name: string) => string): string {
  return address.replace(/\[(\w+)\]|\{(\w+)\}/g, (_, one?: string, two?: string) => id(one ?? two ?? ""))
}

interface Said {
  readonly status: number
  /** The body without what differs from call to call: the request's id, and the ids that were asked for. */
  readonly said: string
}

async function saidBy(response: Response, ids: readonly string[]): Promise<Said> {
  const text = await response.text()
  const plain = text.replace(/"instance":"[^"]*"/, '"instance":""')
  return { status: response.status, said: ids.reduce((said, id) => said.replaceAll(id, "…"), plain) }
}

async function callApi(operation: AnyOperation, id: (name: string) => string): Promise<Said> {
  const { method, path, example, csv } = operation
  const used: string[] = []
  const address = withIds(path, (name) => {
    used.push(id(name))
    return used.at(-1) ?? ""
  })
  const names = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name)
  const body = Object.fromEntries(
    Object.entries(example.request as object).filter(([name]) => !names.includes(name)),
  )
  const query = method === "GET" || method === "DELETE" ? `?${new URLSearchParams(body)}` : ""
  const response = await fetch(`${stack().appUrl}/api/v1${address}${query}`, {
    method,
    headers: { authorization: `Bearer ${ownKey}`, "content-type": csv ? "text/csv" : "application/json" },
    ...(query === "" && { body: JSON.stringify(body) }),
  })
  return saidBy(response, used)
}

async function callPortal(
  role: Role,
  { method, path }: Route,
  slug: string,
  id: (name: string) => string,
): Promise<Said> {
  const used: string[] = []
  const address = withIds(path, (name) => {
    used.push(id(name))
    return used.at(-1) ?? ""
  })
  const response = await fetch(`${stack().appUrl}/api/portal/${slug}/${address}`, {
    method,
    headers: {
      cookie: cookies[role],
      origin: stack().appUrl,
      "sec-fetch-site": "same-origin",
      "content-type": "application/json",
    },
    ...(method !== "GET" && { body: JSON.stringify(bodies[`${method} ${path}`] ?? {}) }),
  })
  return saidBy(response, [...used, slug])
}

/** What a folder of the App Router answers: each exported method of a route, or the GET of a page. */
function routesBelow(folder: string, file: string): Route[] {
  return readdirSync(path.join(root, folder), { recursive: true, encoding: "utf8" })
    .filter((found) => path.basename(found) === file)
    .flatMap((found) => {
      const below = path.dirname(found) === "." ? "" : path.dirname(found)
      if (file === "page.tsx") return [{ method: "GET", path: below }]
      const source = readFileSync(path.join(root, folder, found), "utf8")
      const methods = [...source.matchAll(/export (?:const|async function) (GET|POST|PATCH|DELETE)/g)]
      const mounted = /export const \{ GET/.test(source) ? [{ method: "GET", path: below }] : []
      return [...mounted, ...methods.map(([, method = ""]) => ({ method, path: below }))]
    })
}
