import { z } from "zod"
import { scopes } from "@/lib/api/define-operation"

/** Days after which a new key may expire; null: never. */
export const lifetimes_days = [30, 90, 365, null] as const

/** Hours that a rotated key may go on working beside its successor. */
export const overlaps_h = [0, 24, 72, 168, 720] as const

export const newKeyInput = z.strictObject({
  name: z
    .string()
    .trim()
    .min(2, "Say what the key is for, so that you know what stops when you revoke it.")
    .max(60, "Use at most 60 characters."),
  kind: z.enum(["server", "browser"]),
  mode: z.enum(["sandbox", "live"]),
  scopes: z.array(z.enum(scopes)).min(1, "Allow at least one thing."),
  origins: z.array(z.string().max(200)).max(50, "A key can have 50 origins."),
  lifetime_days: z.union([z.literal(30), z.literal(90), z.literal(365), z.null()]),
})

export const rotationInput = z.strictObject({
  key_id: z.string(),
  overlap_h: z.union([z.literal(0), z.literal(24), z.literal(72), z.literal(168), z.literal(720)]),
})

export const revocationInput = z.strictObject({
  key_id: z.string(),
  reason: z.string().trim().max(200).optional(),
})

export const usageInput = z.strictObject({
  mode: z.enum(["sandbox", "live"]).default("live"),
  days: z.coerce.number().int().min(1).max(366).default(30),
  by: z.enum(["day", "operation", "key"]).default("day"),
})

export const insightsInput = z.strictObject({ days: z.coerce.number().int().min(1).max(365).default(90) })

export const enquiryInput = z.strictObject({ enquiry_id: z.string().max(100) })

export const withdrawalInput = z.strictObject({ token: z.string().max(300) })

export const accountNameInput = z.strictObject({
  name: z
    .string()
    .trim()
    .min(2, "Write a name.")
    .max(80, "Use at most 80 characters.")
    .regex(/^[^\p{Cc}<>]*$/u, "Leave out angle brackets and line breaks."),
})

/** What a person may be in an account, from most to least. */
export const roles = ["owner", "developer", "merchandiser", "viewer"] as const

const role = z.enum(roles)

export const invitationInput = z.strictObject({
  email: z.string().trim().max(254).pipe(z.email("Write the address as name@shop.example.")),
  role,
})

export const ofInvitation = z.strictObject({ invitation_id: z.string() })

export const ofMember = z.strictObject({ user_id: z.string() })

export const roleInput = ofMember.extend({ role })

export const ofExport = z.strictObject({ export_id: z.string() })

export const closingInput = z.strictObject({ name: z.string().max(200) })

export const checkoutInput = z.strictObject({ plan: z.enum(["storefront", "brand"]) })

export const spendingCapInput = z.strictObject({ overage_cap_minor: z.number().int() })

export const requestsInput = z.strictObject({
  outcome: z.enum(["success", "refused"]).optional(),
  key_id: z.string().max(64).optional(),
  /** Exact instant and id of the last row of the page before. */
  before_at: z.iso.datetime({ offset: true }).optional(),
  before_id: z.string().max(64).optional(),
})

export const ofReport = z.strictObject({ report_id: z.string() })

export const reportLetterInput = ofReport.extend({
  email: z.string().trim().max(254).pipe(z.email("Write the address as name@shop.example.")),
})

export const nothing = z.strictObject({})
