import { openAdmin } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { PageHead } from "@/app/ui/sheet"
import { listAccountsForAdmin } from "@/lib/accounts"
import { Accounts } from "./accounts"

export default async function AccountsPage() {
  await openAdmin()
  const accounts = asJson(await listAccountsForAdmin({ now: new Date() }))
  return (
    <>
      <PageHead
        title="Accounts"
        lead="Every account, with its live units of the running period. No shopper's data is here."
      />
      <Accounts accounts={accounts} />
    </>
  )
}
