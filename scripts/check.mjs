import { prepare } from "./stack/prepare.mjs"

await prepare([])
const { check } = await import("./check/main.ts")
await check()
