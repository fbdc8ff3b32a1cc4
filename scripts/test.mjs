import { prepare } from "./stack/prepare.mjs"

await prepare(["postgresql", "chromium", "redis", "poppler"])
const { test } = await import("./test/main.ts")
await test(process.argv.slice(2))
