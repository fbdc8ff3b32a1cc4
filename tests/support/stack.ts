/**
 * The running stack, as a test sees it:
 *
 *     import { stack, takeSettings } from "../support/stack"
 *     await request(stack().appUrl).get("/api/v1/health").expect(200)
 *
 * One file: `npx vitest run --project integration tests/integration/keys.test.ts` starts a stack of its own in a few
 * seconds; with `TARN_TEST_API_ONLY=1` it neither builds nor serves the pages.
 */
import { inject } from "vitest"
import type { Addresses } from "@/scripts/stack/stack"
import type {} from "./global-setup"

/** Addresses, connection strings and the demo world's keys of the stack under test. */
export function stack(): Addresses {
  return inject("stack")
}

/** Lets this test file call verbs and `@/db` itself: gives its process the settings of the web process. */
export function takeSettings(): void {
  Object.assign(process.env, stack().settings)
}
