import type { Json } from "@/app/ui/json"
import { Day } from "@/app/ui/time"
import type { KeyRow } from "@/lib/keys"

export type Key = Json<KeyRow>

/** How a key stands: it works, it works until a set time, or it does not any more. */
export function stateOf(key: Key, now: number): "in force" | "ends" | "expired" | "revoked" {
  if (key.revoked_at) return "revoked"
  if (!key.expires_at) return "in force"
  return Date.parse(key.expires_at) > now ? "ends" : "expired"
}

/** The state of a key in words, with what led to it. */
export function KeyState({ item, now }: { item: Key; now: number }) {
  const state = stateOf(item, now)
  if (state === "revoked") {
    return (
      <span className="text-danger">
        Revoked <Day at={item.revoked_at!} />
        {item.revoked_reason && <span className="block text-soft">{item.revoked_reason}</span>}
      </span>
    )
  }
  if (state === "in force") return <span className="text-action">In force</span>
  return (
    <span className={state === "ends" ? "text-warning" : "text-soft"}>
      {state === "ends" ? "Works until " : "Expired "}
      <Day at={item.expires_at!} />
      {item.successor_id && <span className="block text-soft">It has a successor.</span>}
    </span>
  )
}

/** What a key is, in two words. */
export function kindOf({ kind, mode }: Pick<Key, "kind" | "mode">): string {
  return `${kind}, ${mode}`
}
