import ipaddr from "ipaddr.js"
import { TarnwrightError } from "@/lib/errors"
import { type Access, accessOfKey, accessOfWidget, originMatches } from "@/lib/keys"
import { rateLimiter } from "@/lib/usage"
import type { Progress } from "./progress"
import type { ApiRequest } from "./request"
import type { Match } from "./router"

/** Failed sign-ins of one address in ten minutes, whatever key they try. @source PLATFORM 1.25 */
const failuresPerAddress = { points: 100, window_s: 600 }

/**
 * Admits a call: its key or widget exists and is in force, and the origin, scope and address are allowed. Notes in
 * `progress` whose call it is and which origin may read the answer.
 *
 * @throws TarnwrightError with the 401, 403, 404 or 429 that says why not.
 */
export async function admit(
  match: Match,
  request: ApiRequest,
  publicUrl: string,
  progress: Progress,
): Promise<Access> {
  const { access: needed } = match.operation
  if (needed.kind === "widget") {
    return admitWidget(match.params.widget_id ?? "", request, publicUrl, progress)
  }
  if (needed.kind !== "key") throw new Error(`${match.operation.id} admits everybody`)

  const access = await keyOf(request)
  progress.access = access
  progress.corsOrigin = allowedOrigin(access, request.header("origin"), publicUrl)
  refuseOutOfForce(access)
  if (!access.scopes.includes(needed.scope)) {
    throw new TarnwrightError(
      "scope_missing",
      `This key lacks the scope ${needed.scope}. Make a key that has it.`,
    )
  }
  refuseStrangerAddress(access, request.address)
  return access
}

async function keyOf(request: ApiRequest): Promise<Access> {
  const header = request.header("authorization")
  if (!header) {
    throw new TarnwrightError("key_missing", "Send your key in the header Authorization: Bearer tarn_…")
  }
  const secret = /^Bearer (\S+)$/i.exec(header)?.[1]
  const access = secret && (await accessOfKey(secret))
  if (!access) {
    await countFailure(request.address)
    throw new TarnwrightError("key_unknown", "This is not a key of ours. Check that it was copied whole.")
  }
  return access
}

function refuseOutOfForce(access: Access): void {
  if (access.revoked_at) {
    throw new TarnwrightError("key_revoked", "This key was revoked. Make a new one in the portal.")
  }
  if (access.expires_at && access.expires_at.getTime() <= Date.now()) {
    throw new TarnwrightError("key_expired", "This key has expired. Make a new one in the portal.")
  }
  refuseSuspended(access)
}

async function admitWidget(
  widget_id: string,
  request: ApiRequest,
  publicUrl: string,
  progress: Progress,
): Promise<Access> {
  const access = await accessOfWidget(widget_id)
  if (!access || access.revoked_at) throw new TarnwrightError("not_found", "There is no such widget.")
  progress.access = access
  const origin = request.header("origin")
  // In a frame the widget stands on a page of ours, which none but the widget's origins may frame.
  const isFramed = origin === new URL(publicUrl).origin
  if (!origin || !(isFramed || originMatches(origin, access.origins))) {
    throw new TarnwrightError(
      "origin_not_allowed",
      "This widget may not be used on this page's origin. Add it to the widget.",
    )
  }
  progress.corsOrigin = origin
  refuseSuspended(access)
  return access
}

/** Origin that may read the answer. A server key may not come from a browser, but for the portal's own explorer. */
function allowedOrigin(access: Access, origin: string | undefined, publicUrl: string): string | undefined {
  if (access.kind === "server") {
    const ownExplorer = access.mode === "sandbox" && origin === new URL(publicUrl).origin
    if (!origin || ownExplorer) return undefined
    throw new TarnwrightError(
      "server_key_in_browser",
      "A server key is secret and must not be sent by a web page. Rotate it, and use a browser key there.",
    )
  }
  if (!origin || !originMatches(origin, access.origins)) {
    throw new TarnwrightError(
      "origin_not_allowed",
      "This key may not be used on this page's origin. Add it to the key.",
    )
  }
  return origin
}

function refuseStrangerAddress(access: Access, address: string): void {
  if (access.cidrs.length === 0) return
  const caller = ipaddr.process(address)
  const known = access.cidrs.some((cidr) => {
    const [range, bits] = ipaddr.parseCIDR(cidr)
    return range.kind() === caller.kind() && caller.match(range, bits)
  })
  if (!known) {
    throw new TarnwrightError("address_not_allowed", `The address ${address} is not on this key's list.`)
  }
}

function refuseSuspended(access: Access): void {
  if (access.account_status === "active") return
  const closing = access.account_status === "closing"
  throw new TarnwrightError(
    "account_suspended",
    closing
      ? "An owner has closed this account, so its keys have stopped."
      : "This account is suspended. Its owner was told why by mail.",
  )
}

async function countFailure(address: string): Promise<void> {
  const state = await rateLimiter().take(`failures:${address}`, failuresPerAddress)
  if (!state.allowed) {
    throw new TarnwrightError("rate_limited", "Too many calls with unknown keys came from this address.", {
      retryAfterS: state.reset_s,
    })
  }
}
