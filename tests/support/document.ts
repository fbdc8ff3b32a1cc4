import { readFileSync } from "node:fs"
import Ajv2020 from "ajv/dist/2020"
import addFormats from "ajv-formats"
import type { AnyOperation } from "@/lib/api/define-operation"

/** The committed OpenAPI document. */
export const document = JSON.parse(
  readFileSync(new URL("../../openapi/openapi.json", import.meta.url), "utf8"),
)

const ajv = addFormats(new Ajv2020({ strict: false, allErrors: true }))
ajv.addSchema(document, "document")

interface Answered {
  readonly status: number
  readonly mediaType: string
  readonly body: unknown
}

/** What an answer has that the document does not say; nothing when it keeps to it. */
export function strayFromDocument(operation: AnyOperation, { status, mediaType, body }: Answered): string[] {
  const { path, method } = operation
  const parts = ["paths", path, method.toLowerCase(), "responses", String(status)]
  const pointer = [...parts, "content", mediaType, "schema"]
    .map((part) => encodeURIComponent(part.replaceAll("~", "~0").replaceAll("/", "~1")))
    .join("/")
  const validate = ajv.getSchema(`document#/${pointer}`)
  if (!validate) return [`${operation.id} documents no ${status} as ${mediaType}`]
  validate(body)
  return (validate.errors ?? []).map(({ instancePath, message }) => `${instancePath} ${message}`)
}

export interface Schema {
  readonly $ref?: string
  readonly type?: string
  readonly enum?: readonly unknown[]
  readonly const?: unknown
  readonly anyOf?: readonly Schema[]
  readonly oneOf?: readonly Schema[]
  readonly allOf?: readonly Schema[]
  readonly properties?: Readonly<Record<string, Schema>>
  readonly required?: readonly string[]
  readonly items?: Schema
  readonly minItems?: number
  readonly maxItems?: number
  readonly minimum?: number
  readonly maximum?: number
  readonly minLength?: number
  readonly maxLength?: number
}

/** Schema of an operation's JSON body as the document has it; undefined when it takes none. */
export function bodySchema({ path, method }: AnyOperation): Schema | undefined {
  return document.paths[path]?.[method.toLowerCase()]?.requestBody?.content?.["application/json"]?.schema
}

/** Schemas of an operation's query parameters by their names. */
export function querySchemas({ path, method }: AnyOperation): Record<string, Schema> {
  const parameters = document.paths[path]?.[method.toLowerCase()]?.parameters ?? []
  return Object.fromEntries(
    parameters
      .filter((parameter: { in: string }) => parameter.in === "query")
      .map(({ name, schema }: { name: string; schema: Schema }) => [name, schema]),
  )
}

export function resolved(schema: Schema): Schema {
  if (!schema.$ref) return schema
  const found = schema.$ref
    .replace("#/", "")
    .split("/")
    .reduce((node, part) => node[part], document)
  return resolved(found)
}
