import { prepare } from "./stack/prepare.mjs"

await prepare(["postgresql", "chromium", "redis"])
const { test } = await import("./test/main.ts")
await test(process.argv.slice(2))
