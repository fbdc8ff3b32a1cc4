/** Settings of a process whose billing talks to the stand-in at `url`; nothing else in them is used by these tests. */
export function billingSettings(url: string, secretKey: string): Record<string, string> {
  const database = "postgres://nobody@127.0.0.1:1/none"
  return {
    PUBLIC_URL: "http://127.0.0.1:1",
    DATABASE_URL: database,
    DATABASE_WORKER_URL: database,
    DATABASE_ADMIN_URL: database,
    KEY_PEPPERS: `1:${"p".repeat(32)}`,
    NEXTAUTH_SECRET: "s".repeat(32),
    ENCRYPTION_KEY: Buffer.alloc(32).toString("base64"),
    WIDGET_SIGNING_KEY: "{}",
    SMTP_URL: "smtp://127.0.0.1:1",
    STRIPE_SECRET_KEY: secretKey,
    STRIPE_WEBHOOK_SECRET: "whsec_practice",
    STRIPE_FAKE_HOST: new URL(url).host,
  }
}
