import { personNameInput } from "@/app/api/auth/schemas"
import { personEndpoint } from "@/app/api/portal/endpoint"
import { renamePerson } from "@/lib/accounts"

export const PATCH = personEndpoint({ input: personNameInput, run: renamePerson })
