/**
 * What an archive holds: for each file the table and its columns. Digests, seeds and secrets are in none of them;
 * the calls themselves are there as hourly sums.
 */
export const files = {
  account: {
    table: "account",
    columns: ["id", "slug", "name", "plan", "unit_cap", "overage_cap_minor", "status", "created_at"],
  },
  team: { table: "membership", columns: ["user_id", "role", "created_at"] },
  invitations: {
    table: "invitation",
    columns: ["id", "email", "role", "invited_by", "created_at", "expires_at"],
  },
  keys: {
    table: "api_key",
    columns: [
      "id",
      "kind",
      "mode",
      "name",
      "last4",
      "scopes",
      "origins",
      "cidrs",
      "created_by",
      "created_at",
      "expires_at",
      "last_used_at",
      "revoked_at",
      "revoked_by",
      "revoked_reason",
      "successor_id",
    ],
  },
  widgets: {
    table: "widget",
    columns: ["id", "calculator", "name", "origins", "settings", "created_at", "updated_at", "disabled_at"],
  },
  webhooks: {
    table: "webhook_endpoint",
    columns: ["id", "url", "events", "created_at", "updated_at", "disabled_at", "disabled_reason"],
  },
  catalog: {
    table: "catalog_item",
    columns: [
      "id",
      "kind",
      "name",
      "sku",
      "url",
      "price_minor",
      "currency",
      "attributes",
      "created_at",
      "updated_at",
    ],
  },
  reports: {
    table: "report",
    columns: [
      "id",
      "kind",
      "title",
      "shopper",
      "input",
      "answer",
      "engine_version",
      "created_by",
      "created_at",
      "share_slug",
    ],
  },
  enquiries: {
    table: "enquiry",
    columns: [
      "id",
      "widget_id",
      "page_origin",
      "language",
      "name",
      "email",
      "message",
      "tank",
      "consent_version",
      "consent_wording",
      "consented_at",
      "created_at",
      "erased_at",
    ],
  },
  usage_by_hour: {
    table: "usage_hour",
    columns: ["hour", "mode", "operation", "key_id", "calls", "units"],
  },
  invoices: {
    table: "invoice",
    columns: ["id", "number", "status", "amount_minor", "currency", "hosted_url", "issued_at"],
  },
  audit: {
    table: "audit_log",
    columns: ["id", "at", "actor_kind", "actor_id", "action", "target", "detail", "ip", "request_id"],
  },
} as const
