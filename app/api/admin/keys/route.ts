import { adminEndpoint } from "@/app/api/portal/endpoint"
import { findKeysForAdmin } from "@/lib/keys"
import { keySearchInput } from "../schemas"

export const GET = adminEndpoint({ input: keySearchInput, run: findKeysForAdmin })
