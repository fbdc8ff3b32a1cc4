import type { ColumnType, Generated, JSONColumnType } from "kysely"
import type { CatalogItem, Enquiry, Report, TankEvent } from "./schema-shop"

/** The tables as the newest migration leaves them. */
export interface Schema {
  account: Account
  app_user: AppUser
  membership: Membership
  invitation: Invitation
  session: Session
  account_export: AccountExport
  one_time_token: OneTimeToken
  second_factor: SecondFactor
  recovery_code: RecoveryCode
  sign_in_failure: SignInFailure
  api_key: ApiKey
  usage_event: UsageEvent
  usage_counter: UsageCounter
  usage_hour: UsageHour
  subscription: Subscription
  invoice: Invoice
  stripe_event: StripeEvent
  overage_report: OverageReport
  widget: Widget
  audit_log: AuditLog
  usage_threshold: UsageThreshold
  usage_rollup: UsageRollup
  key_reminder: KeyReminder
  webhook_endpoint: WebhookEndpoint
  webhook_delivery: WebhookDelivery
  refused_call: RefusedCall
  idempotency: Idempotency
  catalog_item: CatalogItem
  report: Report
  enquiry: Enquiry
  tank_event: TankEvent
}

export type AccountStatus = "active" | "suspended" | "closing"
export type Role = "owner" | "developer" | "merchandiser" | "viewer"
export type KeyKind = "server" | "browser"
export type KeyMode = "live" | "sandbox"

type Json = JSONColumnType<Record<string, unknown>>
type CreatedAt = ColumnType<Date, Date | undefined, never>

interface Account {
  id: string
  slug: string
  name: string
  plan: Generated<string>
  /** Units that the account may spend in its current period: what is included, and what its owner allows beyond. */
  unit_cap: Generated<number>
  /** First instant of the subscription's first period; null: calendar months in UTC. */
  period_anchor: Date | null
  /** Most that the owner lets the account spend beyond its plan in a period, in cents. */
  overage_cap_minor: Generated<number>
  status: Generated<AccountStatus>
  status_reason: string | null
  /** Set while the status is `closing`. */
  closing_since: Date | null
  stripe_customer_id: string | null
  created_at: CreatedAt
}

interface AppUser {
  id: string
  email: string
  name: string
  password_hash: string | null
  email_verified_at: Date | null
  is_admin: Generated<boolean>
  preferences: ColumnType<Record<string, unknown>, string | undefined, string>
  created_at: CreatedAt
}

interface Membership {
  account_id: string
  user_id: string
  role: Role
  created_at: CreatedAt
}

interface Invitation {
  account_id: string
  id: string
  email: string
  role: Role
  /** Of the newest letter. */
  token_digest: Buffer
  invited_by: string
  created_at: CreatedAt
  expires_at: Date
}

interface AccountExport {
  account_id: string
  id: string
  requested_by: string
  requested_at: CreatedAt
  finished_at: ColumnType<Date | null, undefined, Date>
  expires_at: ColumnType<Date, Date, never>
  /** A zip file; null while it is being made. */
  archive: ColumnType<Buffer | null, undefined, Buffer>
}

interface Session {
  token_digest: Buffer
  id: string
  user_id: string
  created_at: CreatedAt
  last_seen_at: Generated<Date>
  expires_at: Date
  stepped_up_at: Date | null
  ip: string | null
  user_agent: string | null
}

interface OneTimeToken {
  digest: Buffer
  purpose: "verify_email" | "reset_password" | "sign_in"
  email: string
  payload: ColumnType<Record<string, unknown>, string | undefined, string>
  created_at: CreatedAt
  expires_at: Date
  used_at: Date | null
}

interface SecondFactor {
  user_id: string
  /** Sealed; see lib/seal.ts. */
  seed: Buffer
  /** The time step of the newest code that was accepted: it and the ones before it are used up. */
  last_step: Generated<number>
  created_at: CreatedAt
  /** Null until a first code has shown that the app holds the seed. */
  confirmed_at: Date | null
}

interface RecoveryCode {
  user_id: string
  digest: Buffer
  used_at: Date | null
}

interface SignInFailure {
  id: Generated<number>
  email: string
  ip: string | null
  at: Generated<Date>
}

interface ApiKey {
  account_id: string
  id: string
  kind: KeyKind
  mode: KeyMode
  name: string
  digest: Buffer
  pepper_version: number
  last4: string
  scopes: string[]
  origins: Generated<string[]>
  cidrs: Generated<string[]>
  created_by: string | null
  created_at: CreatedAt
  expires_at: Date | null
  last_used_at: Date | null
  revoked_at: Date | null
  revoked_by: string | null
  revoked_reason: string | null
  successor_id: string | null
}

interface UsageEvent {
  account_id: string
  at: Generated<Date>
  id: string
  key_id: string
  mode: KeyMode
  operation: string
  /** How many calls the row stands for: a run of one operation in a batch is one row. */
  calls: Generated<number>
  /** Units of all of them. */
  units: number
  engine_version: string
  request_id: string
}

interface UsageCounter {
  account_id: string
  mode: KeyMode
  period_start: Date
  period_end: Date
  units: Generated<number>
}

interface UsageHour {
  account_id: string
  hour: Date
  mode: KeyMode
  operation: string
  key_id: string
  calls: number
  units: number
}

interface Subscription {
  account_id: string
  stripe_subscription_id: string
  plan: string
  status: string
  current_period_start: Date
  current_period_end: Date
  cancel_at_period_end: Generated<boolean>
  /** When the oldest invoice that is still owed was issued. */
  past_due_since: Date | null
  /** Plan that it goes to when the period ends. */
  scheduled_plan: string | null
  updated_at: Generated<Date>
}

interface Invoice {
  account_id: string
  id: string
  number: string | null
  status: string
  amount_minor: number
  currency: string
  hosted_url: string | null
  issued_at: Date
}

interface StripeEvent {
  id: string
  type: string
  payload: Json
  received_at: Generated<Date>
  processed_at: Date | null
}

interface OverageReport {
  account_id: string
  hour: Date
  units: number
  included_units: number
  revision: Generated<number>
  delivered_at: Date | null
}

interface Widget {
  account_id: string
  id: string
  calculator: string
  name: string
  origins: Generated<string[]>
  settings: ColumnType<Record<string, unknown>, string | undefined, string>
  created_at: CreatedAt
  updated_at: Generated<Date>
  disabled_at: Date | null
}

interface AuditLog {
  account_id: string
  id: string
  at: Generated<Date>
  actor_kind: "user" | "admin" | "key" | "system"
  actor_id: string | null
  action: string
  target: string | null
  detail: ColumnType<Record<string, unknown>, string | undefined, never>
  ip: string | null
  request_id: string | null
}

interface RefusedCall {
  account_id: string
  id: string
  at: Generated<Date>
  key_id: string
  mode: KeyMode
  method: string
  path: string
  status: number
  code: string
  detail: string
  errors: ColumnType<unknown[], string, never>
}

interface Idempotency {
  account_id: string
  mode: KeyMode
  key: string
  fingerprint: Buffer
  claimed_at: Generated<Date>
  status: number | null
  body: string | null
}

interface UsageThreshold {
  account_id: string
  period_start: Date
  percent: 80 | 100
  period_end: Date
  /** Units spent when the threshold was reached, of `unit_cap`. */
  units: number
  unit_cap: number
  reached_at: Generated<Date>
  notified_at: Date | null
}

interface UsageRollup {
  singleton: Generated<boolean>
  /** The hours before it are summed; null before the first run. */
  rolled_until: Date | null
}

interface KeyReminder {
  account_id: string
  key_id: string
  expires_at: Date
  days_before: number
  sent_at: Generated<Date>
}

interface WebhookEndpoint {
  account_id: string
  id: string
  url: string
  events: string[]
  /** Sealed; see lib/seal.ts. */
  secret: Buffer
  previous_secret: Buffer | null
  previous_secret_until: Date | null
  created_at: CreatedAt
  updated_at: Generated<Date>
  disabled_at: Date | null
  disabled_reason: "paused" | "gone" | null
}

interface WebhookDelivery {
  account_id: string
  id: string
  endpoint_id: string
  /** The same for every endpoint and every repetition of one event. */
  event_id: string
  type: string
  payload: string
  status: Generated<"pending" | "delivered" | "failed">
  attempts: Generated<number>
  created_at: CreatedAt
  next_attempt_at: ColumnType<Date | null, Date | null | undefined, Date | null>
  claimed_until: Date | null
  last_attempt_at: Date | null
  last_status: number | null
  last_failure: string | null
  last_duration_ms: number | null
}
