/**
 * Gives the projects `integration` and `browser` one running stack: the one that `npm test` started (named by
 * `TARN_TEST_STACK`), or one of its own with its own data folder, which is removed at the end.
 */
import { mkdirSync, mkdtempSync, rmSync } from "node:fs"
import path from "node:path"
import type { TestProject } from "vitest/node"
import { removeCluster } from "@/scripts/stack/postgres"
import { type Addresses, type Stack, startStack } from "@/scripts/stack/stack"

declare module "vitest" {
  export interface ProvidedContext {
    stack: Addresses
  }
}

// Both projects call this in one process; they share the stack, and the last one out ends it.
const shared = globalThis as typeof globalThis & {
  tarnwrightTestStack?: { users: number; start: Promise<Owned> }
}

type Owned = { stack: Stack; dataDir: string }

export default async function setup(project: TestProject): Promise<(() => Promise<void>) | undefined> {
  const given = process.env.TARN_TEST_STACK
  if (given) {
    project.provide("stack", JSON.parse(given))
    return undefined
  }
  shared.tarnwrightTestStack ??= { users: 0, start: startOwn() }
  const use = shared.tarnwrightTestStack
  use.users += 1
  const { stack, dataDir } = await use.start
  project.provide("stack", stack.addresses)
  return async () => {
    use.users -= 1
    if (use.users > 0) return
    shared.tarnwrightTestStack = undefined
    await stack.stop()
    removeCluster(dataDir)
    rmSync(dataDir, { recursive: true, force: true })
  }
}

/** `TARN_TEST_API_ONLY=1` leaves out the build and the pages, for a quick round on the API alone. */
async function startOwn(): Promise<Owned> {
  const base = path.resolve(import.meta.dirname, "../../.data")
  mkdirSync(base, { recursive: true })
  const dataDir = mkdtempSync(path.join(base, "test-"))
  try {
    const stack = await startStack({ dataDir, port: 0, withNext: process.env.TARN_TEST_API_ONLY !== "1" })
    return { stack, dataDir }
  } catch (error) {
    removeCluster(dataDir)
    rmSync(dataDir, { recursive: true, force: true })
    throw error
  }
}
