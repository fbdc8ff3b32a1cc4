import { adminEndpoint } from "@/app/api/portal/endpoint"
import { revokeKeyAsAdmin } from "@/lib/keys"
import { adminRevocationInput } from "../../../schemas"

export const POST = adminEndpoint({ input: adminRevocationInput, run: revokeKeyAsAdmin })
