import { prepare } from "./stack/prepare.mjs"

await prepare(["postgresql"])
const { start } = await import("./start/main.ts")
await start()
