import { z } from "zod"

const secret = z.string().min(32)

/** Settings that the start command writes for a local run and an operator sets elsewhere. */
const shape = z.object({
  /** Address that browsers use; a proxy may stand between it and the server. */
  PUBLIC_URL: z.url(),
  /** The application's own role: not the owner of any table, subject to row-level security. */
  DATABASE_URL: z.url(),
  DATABASE_WORKER_URL: z.url(),
  DATABASE_ADMIN_URL: z.url(),
  /** `VERSION:SECRET` pairs, newest first, comma-separated; the digest of a key depends on them. */
  KEY_PEPPERS: z.string().regex(/^\d+:[^,]{32,}(,\d+:[^,]{32,})*$/),
  NEXTAUTH_SECRET: secret,
  /** 32 bytes in base64: encrypts second-factor seeds and webhook secrets at rest. */
  ENCRYPTION_KEY: z
    .base64()
    .refine((value) => Buffer.from(value, "base64").length === 32, "32 bytes in base64"),
  /** Ed25519 private key as a JSON Web Key: signs widget session tokens. */
  WIDGET_SIGNING_KEY: z.string().startsWith("{"),
  SMTP_URL: z.url(),
  MAIL_FROM: z.string().default("Tarnwright <no-reply@tarnwright.test>"),
  STRIPE_SECRET_KEY: z.string().min(1),
  STRIPE_WEBHOOK_SECRET: z.string().min(1),
  /** `host:port` of a stand-in for Stripe, loopback only; absent in production. */
  STRIPE_FAKE_HOST: z
    .string()
    .regex(/^127\.0\.0\.1:\d+$/)
    .optional(),
  REDIS_URL: z.url().optional(),
  /** `1` lets webhooks go to this machine, over http and to any port: for local runs and tests alone. */
  WEBHOOKS_ALLOW_LOOPBACK: z.literal("1").optional(),
})

const settings = shape.refine(
  (given) => given.WEBHOOKS_ALLOW_LOOPBACK === undefined || new URL(given.PUBLIC_URL).protocol !== "https:",
  {
    path: ["WEBHOOKS_ALLOW_LOOPBACK"],
    message: "not where PUBLIC_URL is https, since a customer could then reach this machine's services",
  },
)

export type Env = z.infer<typeof shape>

let parsed: Env | undefined

/**
 * The settings, read once on first use.
 *
 * @throws Error that names each setting that is missing or malformed, without its value.
 */
export function env(): Env {
  if (!parsed) {
    const outcome = settings.safeParse(process.env)
    if (!outcome.success) {
      const problems = outcome.error.issues.map((issue) => `${issue.path.join(".")}: ${issue.message}`)
      throw new Error(`Settings are missing or malformed. ${problems.join("; ")}`)
    }
    parsed = outcome.data
  }
  return parsed
}
