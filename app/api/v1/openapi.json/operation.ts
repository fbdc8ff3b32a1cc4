import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"

export const openapi = defineOperation({
  id: "openapi",
  method: "GET",
  path: "/openapi.json",
  tag: "Service",
  summary: "This document",
  access: { kind: "public" },
  units: 0,
  request: z.strictObject({}),
  response: z.looseObject({ openapi: z.string() }),
  example: { request: {}, response: { openapi: "3.1.0" } },
  async run() {
    // The document is made from the registry that this operation stands in, so it is loaded when asked for.
    const { default: document } = await import("@/openapi/openapi.json")
    return document
  },
})
