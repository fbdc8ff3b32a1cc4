import { listExports, requestExport } from "@/lib/exports"
import { accountEndpoint } from "../../endpoint"
import { nothing } from "../../schemas"

export const GET = accountEndpoint({ right: "account.manage", input: nothing, run: listExports })

export const POST = accountEndpoint({
  right: "account.manage",
  input: nothing,
  fresh: true,
  run: requestExport,
})
