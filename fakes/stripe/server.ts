import { z } from "zod"
import { startFake } from "./start"

const settings = z.object({
  PORT: z.coerce.number().int().min(0).max(65_535).default(0),
  HOST: z.string().default("127.0.0.1"),
  STRIPE_SECRET_KEY: z.string().min(1),
  STRIPE_WEBHOOK_SECRET: z.string().min(1),
  WEBHOOK_URL: z.url().optional(),
  STATE_FILE: z.string().optional(),
})

const env = settings.parse(process.env)
const fake = await startFake({
  port: env.PORT,
  host: env.HOST,
  secretKey: env.STRIPE_SECRET_KEY,
  webhookSecret: env.STRIPE_WEBHOOK_SECRET,
  webhookUrl: env.WEBHOOK_URL,
  stateFile: env.STATE_FILE,
})
console.log(`ready ${fake.url}`)

for (const signal of ["SIGINT", "SIGTERM"] as const) {
  process.once(signal, () => void fake.close().then(() => process.exit(0)))
}
