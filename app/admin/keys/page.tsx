import type { Metadata } from "next"
import { openAdmin } from "@/app/session"
import { PageHead } from "@/app/ui/sheet"
import { KeySearch } from "./key-search"

export const metadata: Metadata = { title: "Keys" }

export default async function AdminKeysPage() {
  await openAdmin()
  return (
    <>
      <PageHead
        title="Keys"
        lead="Find a key of any account by its id or its last four characters, and end it. Keys themselves are never shown."
      />
      <KeySearch />
    </>
  )
}
