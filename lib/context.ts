import type { Role } from "@/db"

/** Who acts. A verb takes the tenant and the actor from here, never from its input. */
export type Actor =
  | { readonly kind: "user"; readonly id: string; readonly role: Role }
  | { readonly kind: "admin"; readonly id: string }
  | { readonly kind: "key"; readonly id: string }
  | { readonly kind: "system"; readonly id: string }

/** What a verb knows of the call it serves. */
export interface Ctx {
  readonly account_id: string
  readonly actor: Actor
  readonly request_id?: string
  readonly ip?: string
  readonly now: Date
}

/** What a verb receives. */
export interface Call<Input> {
  readonly ctx: Ctx
  readonly input: Input
}
