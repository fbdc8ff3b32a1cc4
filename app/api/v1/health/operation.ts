import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import { databaseAnswers } from "@/lib/usage"

export const health = defineOperation({
  id: "health",
  method: "GET",
  path: "/health",
  tag: "Service",
  summary: "Whether the service can take calls",
  access: { kind: "public" },
  units: 0,
  request: z.strictObject({}),
  response: z.object({ status: z.literal("ok"), engine_version: z.string() }),
  problems: ["unavailable"],
  example: { request: {}, response: { status: "ok", engine_version: ENGINE_VERSION } },
  async run() {
    await databaseAnswers()
    return { status: "ok" as const, engine_version: ENGINE_VERSION }
  },
})
