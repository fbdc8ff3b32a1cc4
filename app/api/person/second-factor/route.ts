import { personEndpoint } from "@/app/api/portal/endpoint"
import { nothing } from "@/app/api/portal/schemas"
import { beginSecondFactor, removeSecondFactor } from "@/lib/accounts"

export const POST = personEndpoint({ input: nothing, fresh: true, run: beginSecondFactor })

export const DELETE = personEndpoint({ input: nothing, fresh: true, run: removeSecondFactor })
