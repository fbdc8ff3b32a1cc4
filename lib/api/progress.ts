import type { Access } from "@/lib/keys"
import type { UsageReceipt } from "@/lib/usage"
import type { AnyOperation } from "./define-operation"
import type { LimitState } from "./rate-headers"

/** What is learned on the way through a call, so that a refusal half-way can say it too. */
export interface Progress {
  readonly requestId: string
  readonly limits: LimitState[]
  access?: Access
  corsOrigin?: string
  charged: number
  receipt?: UsageReceipt
  /** Where the operation is to be retired. */
  deprecation?: AnyOperation["deprecation"]
}
