import { z } from "zod"
import { newId } from "../core/ids"
import { page as pageOf } from "../core/lists"
import { bool, clearable, mergeMetadata, metadata, page, str } from "../core/params"
import { route } from "../core/route"

const fields = {
  active: bool.optional(),
  description: clearable.optional(),
  metadata: metadata.optional(),
  statement_descriptor: clearable.optional(),
  tax_code: clearable.optional(),
  unit_label: clearable.optional(),
  url: clearable.optional(),
}

export const products = [
  route(
    "POST",
    "/v1/products",
    z.strictObject({ ...fields, id: str.optional(), name: str, shippable: bool.optional() }),
    ({ fake, params }) => {
      const now = fake.now()
      const product = fake.put("product", {
        id: params.id ?? newId("prod"),
        object: "product",
        active: params.active ?? true,
        created: now,
        default_price: null,
        description: params.description ?? null,
        images: [],
        livemode: false,
        marketing_features: [],
        metadata: mergeMetadata({}, params.metadata),
        name: params.name,
        package_dimensions: null,
        shippable: params.shippable ?? null,
        statement_descriptor: params.statement_descriptor ?? null,
        tax_code: params.tax_code ?? null,
        tax_details: null,
        type: "service",
        unit_label: params.unit_label ?? null,
        updated: now,
        url: params.url ?? null,
      })
      fake.emit("product.created", product)
      return product
    },
  ),
  route(
    "GET",
    "/v1/products",
    z.strictObject({ ...page, active: bool.optional(), ids: z.array(str).optional() }),
    ({ fake, params }) => {
      const found = fake
        .all("product")
        .filter((one) => params.active === undefined || one.active === params.active)
        .filter((one) => !params.ids || params.ids.includes(one.id))
      return pageOf(found, params, "/v1/products")
    },
  ),
  route("GET", "/v1/products/:id", z.strictObject({}), ({ fake, path }) => fake.get("product", path.id!)),
  route(
    "POST",
    "/v1/products/:id",
    z.strictObject({ ...fields, name: str.optional(), default_price: str.optional() }),
    ({ fake, params, path }) => {
      const product = fake.get("product", path.id!)
      const { metadata: change, ...rest } = params
      Object.assign(product, rest, {
        metadata: mergeMetadata(product.metadata, change),
        updated: fake.now(),
      })
      fake.emit("product.updated", product)
      return product
    },
  ),
]
