import { randomUUID } from "node:crypto"
import pg from "pg"
import request from "supertest"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { asAdmin, asWorker, closePools, withTenant } from "@/db"
import { listActs } from "@/lib/audit"
import {
  eraseEnquiry,
  exportEnquiries,
  listEnquiries,
  sendEnquiryCopy,
  showWithdrawal,
  withdraw,
} from "@/lib/enquiries"
import { deleteExpired } from "@/lib/usage"
import { createEndpoint, listDeliveries } from "@/lib/webhooks"
import { createWidget } from "@/lib/widgets"
import { ownAddress } from "../support/address"
import { linkIn, mailsTo, waitForMail } from "../support/mailbox"
import { startReceiver } from "../support/receiver"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber, type Subscriber } from "../support/subscriber"

const shop = "https://shop.example"
const privacy_url = `${shop}/privacy`

beforeAll(() => takeSettings())
afterAll(() => closePools())

interface Asking {
  readonly account: Subscriber
  readonly widget_id: string
  readonly session_token: string
  readonly version: string
}

/** An account with a widget that takes enquiries, and a shopper who has opened its session and read the words. */
async function asking(settings: Record<string, unknown> = { enquiries: { privacy_url } }): Promise<Asking> {
  const account = await createSubscriber({ plan: "brand" })
  const input = { calculator: "co2-level", name: "Reactors", origins: [shop], settings } as const
  const { id: widget_id } = await createWidget({ ctx: account.ctx, input })
  const session = await call("post", `/widgets/${widget_id}/sessions`).send({}).expect(200)
  const consent = await call("get", `/widgets/${widget_id}/consent?language=en`)
  return { account, widget_id, session_token: session.body.token, version: consent.body.version }
}

function call(method: "get" | "post", path: string, from = ownAddress()) {
  return request(stack().appUrl)[method](`/api/v1${path}`).agent(from).set("origin", shop)
}

function enquiryOf({ session_token, version }: Asking, more: object = {}) {
  return {
    session_token,
    language: "en",
    name: "Ebba Lindqvist",
    email: `${randomUUID()}@shopper.test`,
    message: "Will the Rill 25 do for my tank?",
    tank: { ph: 6.8, kh_dkh: 4, temperature_c: 25, level: "in_range" },
    consent: { given: true, version },
    ...more,
  }
}

async function ask(shopper: Asking, more: object = {}): Promise<{ id: string; email: string }> {
  const body = enquiryOf(shopper, more)
  const answer = await call("post", `/widgets/${shopper.widget_id}/enquiries`).send(body)
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return { id: answer.body.enquiry_id, email: body.email }
}

const all = ({ account }: Asking) => listEnquiries({ ctx: account.ctx, input: { limit: 100 } })

describe("201: an enquiry", () => {
  it("is kept with the words that the shopper agreed to, and costs nothing", async () => {
    const shopper = await asking()
    const { id, email } = await ask(shopper)
    const [kept] = await all(shopper)
    expect(kept).toMatchObject({
      id,
      email,
      name: "Ebba Lindqvist",
      widget_id: shopper.widget_id,
      page_origin: shop,
      language: "en",
      tank: { ph: 6.8, kh_dkh: 4, temperature_c: 25, level: "in_range" },
      consent_version: shopper.version,
      erased_at: null,
    })
    expect(kept?.consent_wording).toContain("A test's account may keep my e-mail address")
    expect(kept?.consent_wording).toContain("180 days")
    const units = await withTenant(shopper.account.ctx.account_id, (trx) =>
      trx.selectFrom("usage_event").select("operation").execute(),
    )
    expect(units).toEqual([{ operation: "openWidgetSession" }])
  })

  it("is told to the shop's owner without a word of the shopper's, and copied to the shopper", async () => {
    const shopper = await asking()
    const { id, email } = await ask(shopper)
    const toShop = await waitForMail(shopper.account.email, "A shopper asks")
    expect(toShop.text).toContain(`/portal/${shopper.account.slug}/enquiries?open=${id}`)
    expect(`${toShop.text}${toShop.html}`).not.toMatch(/Rill 25|Ebba|shopper\.test/)
    const copy = await waitForMail(email, "Your question to")
    expect(copy.text).toContain("Will the Rill 25 do for my tank?")
    expect(copy.text).toContain("Carbonate hardness: 4 dKH")
    expect(linkIn(copy)).toContain("/withdraw/")
  })

  it.each([
    ["de", "Ihre Frage an", "Karbonathärte: 4,5 dKH"],
    ["es", "Su pregunta a", "Dureza de carbonatos: 4,5 dKH"],
    ["ja", "へのご質問", "炭酸塩硬度：4.5 dKH"],
  ])("is copied in the shopper's language: %s", async (language, subject, line) => {
    const shopper = await asking()
    const consent = await call("get", `/widgets/${shopper.widget_id}/consent?language=${language}`).expect(
      200,
    )
    const { email } = await ask(shopper, {
      language,
      tank: { kh_dkh: 4.5 },
      consent: { given: true, version: consent.body.version },
    })
    const copy = await waitForMail(email, subject)
    expect(copy.text).toContain(line)
    expect(copy.html).toContain(`<html lang="${language}">`)
  })

  it("is an event that names it and nothing of the shopper", async () => {
    const shopper = await asking()
    const receiver = await startReceiver()
    const { ctx } = shopper.account
    const events = ["enquiry.created"] as const
    const endpoint = await createEndpoint({ ctx, input: { url: receiver.url, events } })
    const { id } = await ask(shopper)
    const [received] = await receiver.waitFor(1)
    expect(JSON.parse(received!.body)).toMatchObject({
      type: "enquiry.created",
      data: { enquiry_id: id, widget_id: shopper.widget_id },
    })
    const deliveries = await listDeliveries({ ctx, input: { endpoint_id: endpoint.id, limit: 10 } })
    expect(JSON.stringify(deliveries)).not.toMatch(/Rill 25|Ebba|shopper\.test/)
    await receiver.close()
  })

  it("sent twice under one idempotency key is one", async () => {
    const shopper = await asking()
    const body = enquiryOf(shopper)
    const send = () =>
      call("post", `/widgets/${shopper.widget_id}/enquiries`).set("idempotency-key", body.email).send(body)
    const first = await send().expect(201)
    const second = await send().expect(201)
    expect(second.body).toEqual(first.body)
    expect(await all(shopper)).toHaveLength(1)
  })
})

describe("403, 404, 422, 429: an enquiry that is refused is not kept", () => {
  it.each([
    ["no consent at all", { consent: undefined }, "/consent/given"],
    ["a box that is not ticked", { consent: { given: false, version: "now" } }, "/consent/given"],
    ["consent to other words", { consent: { given: true, version: "2025-01-01.en.0" } }, "/consent/version"],
    ["no address", { email: "ebba" }, "/email"],
    ["an empty message", { message: "  " }, "/message"],
    ["a name of two lines", { name: "Ebba\nBcc: all" }, "/name"],
    ["a figure beyond its bounds", { tank: { ph: 15 } }, "/tank/ph"],
    ["a figure that is not known", { tank: { address: "Mill Lane" } }, "/tank/address"],
  ])("with %s", async (_, wrong, pointer) => {
    const shopper = await asking()
    const { status, body } = await call("post", `/widgets/${shopper.widget_id}/enquiries`).send(
      enquiryOf(shopper, wrong),
    )
    expect(status).toBe(422)
    expect(body.errors.map((error: { pointer: string }) => error.pointer)).toContain(pointer)
    expect(body.detail).toMatch(/[a-z]+ [a-z]+/)
    expect(await all(shopper)).toEqual([])
  })

  it("from another origin, and without an origin", async () => {
    const shopper = await asking()
    const path = `/widgets/${shopper.widget_id}/enquiries`
    for (const origin of ["https://other.example", ""]) {
      const { body, headers } = await call("post", path)
        .set("origin", origin)
        .send(enquiryOf(shopper))
        .expect(403)
      expect(body.code).toBe("origin_not_allowed")
      expect(headers["access-control-allow-origin"]).toBeUndefined()
    }
    expect(await all(shopper)).toEqual([])
  })

  it("with another widget's session, and with none of ours", async () => {
    const [one, other] = [await asking(), await asking()]
    for (const session_token of [other.session_token, "made.up.token"]) {
      await call("post", `/widgets/${one.widget_id}/enquiries`)
        .send(enquiryOf(one, { session_token }))
        .expect(403)
    }
    expect(await all(one)).toEqual([])
  })

  it("by a widget that takes none", async () => {
    const shopper = await asking({})
    await call("get", `/widgets/${shopper.widget_id}/consent?language=en`).expect(404)
    await call("post", `/widgets/${shopper.widget_id}/enquiries`)
      .send(enquiryOf(shopper, { consent: { given: true, version: "x" } }))
      .expect(404)
    expect(await all(shopper)).toEqual([])
  })

  it("after five of one address in ten minutes", async () => {
    const shopper = await asking()
    const from = ownAddress()
    const send = () => call("post", `/widgets/${shopper.widget_id}/enquiries`, from).send(enquiryOf(shopper))
    for (let count = 0; count < 5; count += 1) await send().expect(201)
    const { body, headers } = await send().expect(429)
    expect(body.detail).toContain("5 times in 600 seconds")
    expect(Number(headers["retry-after"])).toBeGreaterThan(500)
    expect(await all(shopper)).toHaveLength(5)
  })
})

describe("the list of enquiries", () => {
  it("goes newest first by cursor, to a key with the scope and to no other", async () => {
    const shopper = await asking()
    const ids: string[] = []
    for (let count = 0; count < 3; count += 1) ids.unshift((await ask(shopper)).id)
    const { secret } = await shopper.account.key({ scopes: ["enquiries"] })
    const list = (query: string, key = secret) =>
      request(stack().appUrl).get(`/api/v1/enquiries?${query}`).set("authorization", `Bearer ${key}`)
    const first = await list("limit=2").expect(200)
    expect(first.body.data.map(({ id }: { id: string }) => id)).toEqual(ids.slice(0, 2))
    expect(first.headers.link).toContain(`cursor=${first.body.next_cursor}`)
    const second = await list(`limit=2&cursor=${first.body.next_cursor}`).expect(200)
    expect(second.body.data.map(({ id }: { id: string }) => id)).toEqual(ids.slice(2))
    expect(second.body.next_cursor).toBeNull()
    const other = await (await asking()).account.key({ scopes: ["enquiries"] })
    expect((await list("limit=2", other.secret).expect(200)).body.data).toEqual([])
    await list(`limit=2&cursor=${first.body.next_cursor}`, other.secret).expect(422)
    await request(stack().appUrl)
      .get(`/api/v1/enquiries/${ids[0]}`)
      .set("authorization", `Bearer ${other.secret}`)
      .expect(404)
  })

  it("is exported as CSV in which no cell is a formula, and the audit trail says who took it", async () => {
    const shopper = await asking()
    await ask(shopper, { name: "=cmd|calc", message: 'He said "no",\n+1 to that' })
    const { csv, rows } = await exportEnquiries({ ctx: shopper.account.as("owner") })
    expect(rows).toBe(1)
    expect(csv).toContain(",'=cmd|calc,")
    expect(csv).toContain('"He said ""no"",\n+1 to that"')
    const [act] = await listActs({ ctx: shopper.account.ctx, input: { limit: 1 } })
    expect(act).toMatchObject({ action: "enquiry.exported", actor_kind: "user", detail: { rows: 1 } })
  })
})

describe("erasing an enquiry", () => {
  /** Every text of every row of every table that holds this account's rows, the queue among them. */
  async function everything(): Promise<string> {
    const superuser = new pg.Client({ connectionString: stack().databaseUrls.superuser })
    await superuser.connect()
    const { rows: tables } = await superuser.query(
      `select format('%I.%I', table_schema, table_name) as name from information_schema.tables
        where table_type = 'BASE TABLE' and table_schema in ('public', 'graphile_worker')`,
    )
    const texts: string[] = []
    for (const { name } of tables) {
      const { rows } = await superuser.query(`select t::text as row from ${name} t`)
      texts.push(...rows.map(({ row }) => row))
    }
    await superuser.end()
    return texts.join("\n")
  }

  it("leaves nothing personal anywhere in the database", async () => {
    const shopper = await asking()
    const receiver = await startReceiver()
    const { ctx } = shopper.account
    await createEndpoint({ ctx, input: { url: receiver.url, events: ["enquiry.created"] } })
    const name = `Ebba-${randomUUID()}`
    const message = `Question-${randomUUID()}`
    const { id, email } = await ask(shopper, { name, message })
    await waitForMail(email)
    await receiver.waitFor(1)
    const before = await everything()
    for (const text of [name, message, email]) expect(before).toContain(text)

    await eraseEnquiry({ ctx: shopper.account.as("merchandiser"), input: { enquiry_id: id } })
    const after = await everything()
    for (const text of [name, message, email]) expect(after).not.toContain(text)
    const [left] = await all(shopper)
    expect(left).toMatchObject({ id, name: null, email: null, message: null, tank: null })
    expect(left?.consent_wording).toContain("may keep my e-mail address")
    const [act] = await listActs({ ctx, input: { limit: 1 } })
    expect(act).toMatchObject({ action: "enquiry.erased", target: id })
    await receiver.close()
  })

  it("over the API, once for all", async () => {
    const shopper = await asking()
    const { id } = await ask(shopper)
    const { secret } = await shopper.account.key({ scopes: ["enquiries"] })
    const at = (method: "get" | "delete") =>
      request(stack().appUrl)[method](`/api/v1/enquiries/${id}`).set("authorization", `Bearer ${secret}`)
    await at("delete").expect(204)
    const { body } = await at("get").expect(200)
    expect(body).toMatchObject({ id, email: null, message: null })
    await at("delete").expect(204)
    expect((await at("get")).body.erased_at).toBe(body.erased_at)
  })

  it("before the copy is mailed means that none is mailed", async () => {
    const shopper = await asking()
    const { id, email } = await ask(shopper)
    await waitForMail(email)
    await eraseEnquiry({ ctx: shopper.account.ctx, input: { enquiry_id: id } })
    await sendEnquiryCopy({ account_id: shopper.account.ctx.account_id, enquiry_id: id })
    expect(await mailsTo(email)).toHaveLength(1)
  })

  it("is what the shopper's own link does, and no other link", async () => {
    const shopper = await asking()
    const { id, email } = await ask(shopper)
    const other = await ask(shopper)
    const token = linkIn(await waitForMail(email))
      .split("/")
      .at(-1)!
    const now = new Date()
    expect(await showWithdrawal({ token, now })).toMatchObject({ language: "en", erased_at: null })
    const [text = "", mac = ""] = token.split(".")
    const forged = `${Buffer.from(Buffer.from(text, "base64url").toString().replace(id, other.id)).toString("base64url")}.${mac}`
    await expect(withdraw({ token: forged, now })).rejects.toMatchObject({ code: "not_found" })
    for (const token of [forged, "none", ""]) {
      await expect(showWithdrawal({ token, now })).rejects.toMatchObject({ code: "not_found" })
    }
    await withdraw({ token, now })
    const kept = await all(shopper)
    expect(kept.map(({ id, email }) => [id, email])).toEqual([
      [other.id, other.email],
      [id, null],
    ])
  })

  it("is done by us after 180 days, for the whole row", async () => {
    const shopper = await asking()
    const [{ id: old }, { id: young }] = [await ask(shopper), await ask(shopper)]
    await age(old, 181)
    await age(young, 179)
    expect((await deleteExpired()).enquiry).toBeGreaterThanOrEqual(1)
    expect((await all(shopper)).map(({ id }) => id)).toEqual([young])
  })

  async function age(id: string, days: number): Promise<void> {
    const superuser = new pg.Client({ connectionString: stack().databaseUrls.superuser })
    await superuser.connect()
    await superuser.query("update enquiry set created_at = now() - make_interval(days => $2) where id = $1", [
      id,
      days,
    ])
    await superuser.end()
  }
})

describe("the platform's admin", () => {
  it.each(["enquiry", "tank_event"] as const)("cannot read %s", async (table) => {
    await ask(await asking())
    const read = asAdmin((trx) => trx.selectFrom(table).select("account_id").execute())
    await expect(read).rejects.toMatchObject({ code: "42501" })
    expect(
      (await asWorker((trx) => trx.selectFrom("enquiry").select("id").execute())).length,
    ).toBeGreaterThan(0)
  })
})
