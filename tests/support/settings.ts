/** Settings of a process that reaches nothing: enough for `lib/env.ts`, for tests of what needs no stack. */
export function practiceSettings(): Record<string, string> {
  const database = "postgres://nobody@127.0.0.1:1/none"
  return {
    PUBLIC_URL: "http://127.0.0.1:1",
    DATABASE_URL: database,
    DATABASE_WORKER_URL: database,
    DATABASE_ADMIN_URL: database,
    KEY_PEPPERS: `1:${"p".repeat(32)}`,
    NEXTAUTH_SECRET: "s".repeat(32),
    ENCRYPTION_KEY: Buffer.alloc(32, 7).toString("base64"),
    WIDGET_SIGNING_KEY: "{}",
    SMTP_URL: "smtp://127.0.0.1:1",
    STRIPE_SECRET_KEY: "sk_test_practice",
    STRIPE_WEBHOOK_SECRET: "whsec_practice",
  }
}
