import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { PageHead } from "@/app/ui/sheet"
import { Explorer } from "./explorer"

export const metadata: Metadata = { title: "Explorer" }

export default async function ExplorerPage({ params }: OfAccount) {
  const { account } = await openAccountFor("explorer.use", params)
  return (
    <>
      <PageHead
        title="Explorer"
        lead="Every operation, answered by the running API. Calls count in the sandbox, which is free."
      />
      <Explorer account={account.slug} />
    </>
  )
}
