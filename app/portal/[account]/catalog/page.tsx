import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { wholeCatalog } from "@/app/portal/whole-catalog"
import { openAccountFor } from "@/app/session"
import { can } from "@/lib/accounts"
import { attributesOf, csvColumns, itemKindNames, itemKinds } from "@/lib/catalog"
import { quantities } from "@/lib/units/quantities"
import { Catalog } from "./catalog"
import type { KindInfo } from "./kind-info"

export const metadata: Metadata = { title: "Catalogue" }

const kinds: readonly KindInfo[] = itemKindNames.map((name) => ({
  name,
  label: itemKinds[name].label,
  attributes: attributesOf(name).map((attribute) => {
    const { unit, min, max } = quantities[attribute.quantity]
    return { name: attribute.name, required: attribute.required, unit, min, max }
  }),
}))

export default async function CatalogPage({ params }: OfAccount) {
  const { account, actor, ctx } = await openAccountFor("catalog.read", params)
  return (
    <Catalog
      account={account.slug}
      initial={await wholeCatalog({ ctx })}
      kinds={kinds}
      csvColumns={csvColumns}
      mayManage={can(actor, "catalog.manage")}
    />
  )
}
