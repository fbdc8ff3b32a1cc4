import type { roles } from "@/app/api/portal/schemas"

type Role = (typeof roles)[number]

/** What a role is for, in a line. */
export const does: Record<Role, string> = {
  owner: "Everything, with billing and team",
  developer: "Keys, explorer, usage, widgets, webhooks",
  merchandiser: "Catalogue, widgets and what shoppers ask",
  viewer: "The bench, usage and invoices",
}
