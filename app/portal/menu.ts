import type { Right } from "@/lib/accounts"

export interface MenuItem {
  readonly path: string
  readonly label: string
  readonly right: Right
}

/** The pages of an account, in groups, each with the right that it takes to see it. */
export const menu: readonly { readonly group: string; readonly items: readonly MenuItem[] }[] = [
  {
    group: "Build",
    items: [
      { path: "", label: "Overview", right: "account.read" },
      { path: "/keys", label: "Keys", right: "key.read" },
      { path: "/explorer", label: "Explorer", right: "explorer.use" },
      { path: "/requests", label: "Requests", right: "request.read" },
      { path: "/usage", label: "Usage", right: "usage.read" },
      { path: "/webhooks", label: "Webhooks", right: "webhook.read" },
    ],
  },
  {
    group: "Shop",
    items: [
      { path: "/bench", label: "Bench", right: "bench.use" },
      { path: "/reports", label: "Reports", right: "report.read" },
      { path: "/catalog", label: "Catalogue", right: "catalog.read" },
      { path: "/enquiries", label: "Enquiries", right: "enquiry.read" },
      { path: "/insights", label: "Insights", right: "insight.read" },
    ],
  },
  {
    group: "Account",
    items: [
      { path: "/team", label: "Team", right: "team.read" },
      { path: "/billing", label: "Billing", right: "billing.read" },
      { path: "/audit", label: "Audit", right: "audit.read" },
      { path: "/settings", label: "Settings", right: "account.manage" },
    ],
  },
]
