import type { ErrorCode } from "@/lib/errors"

/** What each refusal means and how to mend it. */
export const errorWords: Record<ErrorCode, { readonly why: string; readonly mend: string }> = {
  malformed_json: {
    why: "The body could not be read as JSON.",
    mend: "Send one JSON object. Look for a trailing comma, single quotes, NaN or a body that was cut off.",
  },
  key_in_url: {
    why: "A key was found in the address of the call. Addresses are kept in logs, histories and proxies.",
    mend: "Send the key in the header Authorization: Bearer, and rotate the one that stood in the address.",
  },
  session_missing: {
    why: "A page of the portal asked for something, and nobody is signed in any more.",
    mend: "Sign in again. Your own code never meets this: it uses keys.",
  },
  second_factor_required: {
    why: "The password or the link is right, and this sign-in is protected by a second factor as well.",
    mend: "Write the six digits that your authenticator app shows, or one of your recovery codes. Your own code never meets this: it uses keys.",
  },
  step_up_required: {
    why: "What was asked for can do lasting harm, and nobody has confirmed in the last ten minutes that it is really them.",
    mend: "Confirm with your password or a code in the dialog that the portal shows. Your own code never meets this: it uses keys.",
  },
  key_missing: {
    why: "The call carries no key.",
    mend: "Add the header Authorization: Bearer followed by the key.",
  },
  key_unknown: {
    why: "What was sent is not a key of ours, or a character of it is wrong.",
    mend: "Copy the key whole; it ends in a checksum, so that one wrong character is enough. If it is lost, make a new one.",
  },
  key_revoked: {
    why: "Someone ended this key, in your account or on our side. The owners were told by mail where it was us.",
    mend: "Make a new key in the portal and put it in the place of this one.",
  },
  key_expired: {
    why: "The key had an end, or it was rotated and its overlap is over.",
    mend: "Use its successor, or make a new key.",
  },
  server_key_in_browser: {
    why: "A server key came from a web page. Everyone who opened the page can read it.",
    mend: "Rotate the key now. On pages use a browser key, or call your own server, which holds the server key.",
  },
  origin_not_allowed: {
    why: "The page's origin is not on the list of this browser key or widget.",
    mend: "Add the origin in the portal: scheme, host and port, as https://shop.example. One left-most wildcard label is allowed.",
  },
  address_not_allowed: {
    why: "The key is bound to network addresses, and this call came from another one.",
    mend: "Call from an allowed address, or change the list of the key.",
  },
  scope_missing: {
    why: "The key exists and works, but not for this operation.",
    mend: "Use a key that has the scope named in the detail. Scopes of a key cannot be changed: make a new one.",
  },
  account_suspended: {
    why: "The account is suspended, so its keys are refused.",
    mend: "An owner finds the reason in the portal. Write to us to settle it.",
  },
  forbidden: {
    why: "Your role in the account does not allow this.",
    mend: "Ask an owner of the account to do it, or to change your role.",
  },
  plan_limit_reached: {
    why: "The plan includes no more of these, or does not include them at all.",
    mend: "Remove one that you no longer need, or choose a larger plan under Billing.",
  },
  quota_reached: {
    why: "The units of the period are used up, and the plan or the owner's cap allows no more. The call was not made and cost nothing.",
    mend: "Wait until the period ends, choose a larger plan, or let an owner raise the cap. In the sandbox, wait until midnight UTC.",
  },
  not_found: {
    why: "There is nothing at this address, or nothing that belongs to your account.",
    mend: "Check the path and the id. What belongs to another account answers the same.",
  },
  method_not_allowed: {
    why: "The path exists, but not with this method.",
    mend: "Use one of the methods named in the detail. Calculations are POST.",
  },
  gone: {
    why: "The operation was retired at the date that its Sunset header had told before.",
    mend: "Use what the detail names in its place. The changelog says what changes with it.",
  },
  conflict: {
    why: "The change does not fit what is stored now.",
    mend: "Read the current state, then decide again.",
  },
  idempotency_conflict: {
    why: "This Idempotency-Key was used before, for another request, or its first request is still running.",
    mend: "Use a new key for each new request, and the same key only to repeat the same one.",
  },
  body_too_large: {
    why: "The body is larger than 256 KiB.",
    mend: "Split the work into several calls.",
  },
  media_type_unsupported: {
    why: "The body was sent as something else than JSON.",
    mend: "Send the header Content-Type: application/json.",
  },
  validation_failed: {
    why: "A field is missing, unknown, of the wrong type or out of its bounds. All of them are listed in errors.",
    mend: "Go through errors: pointer names the field (RFC 6901), detail says what it wants. An unknown field is often a unit that was misspelt.",
  },
  out_of_domain: {
    why: "Each number is well formed, but together they cannot be, or they lie where the method was never tested.",
    mend: "The detail names the limit and the field to change.",
  },
  rate_limited: {
    why: "More calls a second than the plan or the key allows.",
    mend: "Wait for Retry-After seconds. Put many calculations into one batch.",
  },
  internal: {
    why: "Something failed on our side. It was recorded under the id in instance. The call cost nothing.",
    mend: "Try again once. If it stays, write to us with the id.",
  },
  unavailable: {
    why: "We could not do it just now: the database or a service behind us does not answer. The call cost nothing.",
    mend: "Wait for Retry-After seconds and try again. The state is on the status page.",
  },
}
