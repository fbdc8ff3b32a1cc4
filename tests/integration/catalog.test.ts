import request from "supertest"
import { beforeAll, describe, expect, it } from "vitest"
import { createTestAccount } from "../support/account"
import { stack, takeSettings } from "../support/stack"

beforeAll(() => takeSettings())

async function shop() {
  const account = await createTestAccount()
  const { secret } = await account.key({ scopes: ["calculate", "catalog"] })
  const as = (pending: request.Test) => pending.set("authorization", `Bearer ${secret}`)
  const api = request(stack().appUrl)
  return {
    post: (path: string, body: object) => as(api.post(`/api/v1${path}`)).send(body),
    get: (path: string) => as(api.get(`/api/v1${path}`)),
    patch: (path: string, body: object) => as(api.patch(`/api/v1${path}`)).send(body),
    remove: (path: string) => as(api.delete(`/api/v1${path}`)),
    csv: (text: string, query = "") =>
      as(api.post(`/api/v1/catalog/imports${query}`))
        .set("content-type", "text/csv")
        .send(text),
  }
}

const filter = {
  kind: "filter",
  name: "Canister 1000",
  sku: "C-1000",
  price: { amount_minor: 18_900, currency: "USD" },
  attributes: { max_flow_l_h: 1000, max_head_m: 1.6 },
}
const tank = { length_cm: 90, width_cm: 45, height_cm: 45, kh_dkh: 4 }
const loop = { pump: { max_flow_l_h: 600, max_head_m: 1.2 }, hose: { inner_diameter_mm: 16, length_m: 3 } }

describe("a part", () => {
  it("is added, read, changed and taken out", async () => {
    const { post, get, patch, remove } = await shop()
    const made = (await post("/catalog/items", filter).expect(201)).body
    expect(made).toMatchObject(filter)
    expect((await get(`/catalog/items/${made.id}`).expect(200)).body).toEqual(made)
    const changed = (
      await patch(`/catalog/items/${made.id}`, { name: "Canister 1000 quiet", price: null }).expect(200)
    ).body
    expect(changed).toMatchObject({
      name: "Canister 1000 quiet",
      price: null,
      sku: "C-1000",
      attributes: filter.attributes,
    })
    await remove(`/catalog/items/${made.id}`).expect(204)
    await get(`/catalog/items/${made.id}`).expect(404)
  })

  it("without the numbers of its kind is refused with a pointer, and nothing is kept", async () => {
    const { post, get } = await shop()
    const { body } = await post("/catalog/items", { ...filter, attributes: { max_flow_l_h: 1000 } }).expect(
      422,
    )
    expect(body.errors).toMatchObject([{ pointer: "/attributes/pump_curve" }])
    expect((await get("/catalog/items").expect(200)).body.data).toEqual([])
  })

  it("of another account is as if it had never been", async () => {
    const [one, other] = [await shop(), await shop()]
    const made = (await one.post("/catalog/items", filter).expect(201)).body
    const foreign = (await other.get(`/catalog/items/${made.id}`).expect(404)).body
    const unknown = (await other.get("/catalog/items/item_00000000000000000000000000").expect(404)).body
    expect({ ...foreign, instance: "" }).toEqual({ ...unknown, instance: "" })
    await other.patch(`/catalog/items/${made.id}`, { name: "Mine" }).expect(404)
    await other.remove(`/catalog/items/${made.id}`).expect(404)
    await other.post("/catalog/items", filter).expect(201)
  })

  it("is made once for one idempotency key, and a second body with it is refused", async () => {
    const { post, get } = await shop()
    const first = await post("/catalog/items", filter).set("idempotency-key", "one-part").expect(201)
    const again = await post("/catalog/items", filter).set("idempotency-key", '"one-part"').expect(201)
    expect(again.headers["idempotency-replayed"]).toBe("true")
    expect(again.body).toEqual(first.body)
    const conflict = await post("/catalog/items", { ...filter, name: "Another" }).set(
      "idempotency-key",
      "one-part",
    )
    expect(conflict.status).toBe(409)
    expect(conflict.body.code).toBe("idempotency_conflict")
    expect((await get("/catalog/items")).body.data).toHaveLength(1)
  })
})

describe("the list", () => {
  it("pages by cursor with a link, stable while parts are added, and refuses another list's cursor", async () => {
    const { post, get } = await shop()
    for (let index = 0; index < 5; index++)
      await post("/catalog/items", { kind: "other", name: `Part ${index}` }).expect(201)
    const first = await get("/catalog/items?limit=2").expect(200)
    expect(first.body.data.map(({ name }: { name: string }) => name)).toEqual(["Part 4", "Part 3"])
    expect(first.headers.link).toMatch(/^<\/api\/v1\/catalog\/items\?limit=2&cursor=.+>; rel="next"$/)
    await post("/catalog/items", { kind: "other", name: "Part 5" }).expect(201)
    const next = await get(/<\/api\/v1(.+)>/.exec(first.headers.link ?? "")?.[1] ?? "").expect(200)
    expect(next.body.data.map(({ name }: { name: string }) => name)).toEqual(["Part 2", "Part 1"])
    await get(`/catalog/items?kind=filter&cursor=${first.body.next_cursor}`).expect(422)
  })
})

describe("an import", () => {
  const good = "kind,name,sku,max_flow_l_h,max_head_m\nfilter,One,A,1000,1.6\nfilter,Two,B,700,1.2\n"

  it("says what a dry run would do and does it afterwards; known skus are changed", async () => {
    const { csv, get } = await shop()
    expect((await csv(good, "?dry_run=true").expect(200)).body).toEqual({
      rows: 2,
      created: 2,
      changed: 0,
      imported: false,
      errors: [],
    })
    expect((await get("/catalog/items")).body.data).toEqual([])
    expect((await csv(good).expect(200)).body).toMatchObject({ created: 2, imported: true })
    expect((await csv(`${good}filter,Three,C,900,1.4\n`).expect(200)).body).toMatchObject({
      created: 1,
      changed: 2,
    })
    expect((await get("/catalog/items")).body.data).toHaveLength(3)
  })

  it("takes nothing when one row is bad, unless asked to take the good ones", async () => {
    const { csv, get } = await shop()
    const bad = `${good}filter,Four,D,much,1.4\n`
    const held = (await csv(bad).expect(200)).body
    expect(held).toMatchObject({ rows: 3, imported: false, errors: [{ row: 4, column: "max_flow_l_h" }] })
    expect((await get("/catalog/items")).body.data).toEqual([])
    expect((await csv(bad, "?partial=true").expect(200)).body).toMatchObject({ created: 2, imported: true })
    expect((await get("/catalog/items")).body.data).toHaveLength(2)
  })
})

describe("matching", () => {
  it("ranks the account's own parts that fit the tank, with reason and margin, and leaves out what does not", async () => {
    const { post } = await shop()
    const strong = (await post("/catalog/items", filter)).body.id
    await post("/catalog/items", {
      ...filter,
      sku: "C-200",
      name: "Tiny",
      attributes: { max_flow_l_h: 200, max_head_m: 0.5 },
    })
    const { body } = await post("/catalog/match", { ...tank, ...loop }).expect(200)
    const filters = body.matches.filter(({ kind }: { kind: string }) => kind === "filter")
    expect(filters).toMatchObject([{ item_id: strong, rank: 1 }])
    expect(filters[0].reason).toMatch(/L\/h/)
    const plan = await post("/plan", { ...tank, ...loop, use_catalog: true }).expect(200)
    expect(plan.body.result.catalog_matches).toEqual(body.matches)
    expect(plan.headers["tarnwright-units"]).toBe("5")
  })
})
