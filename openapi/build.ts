import { readFile, writeFile } from "node:fs/promises"
import openapiTypescript, { astToString } from "openapi-typescript"
import { buildDocument } from "./document"

// `tsx openapi/build.ts` writes the document and the types of the client; `--check` only says whether they are current.
const checkOnly = process.argv.includes("--check")

const document = await buildDocument()
const text = `${JSON.stringify(document, null, 2)}\n`
const types = astToString(await openapiTypescript(text))
const outputs = [
  [new URL("./openapi.json", import.meta.url), text],
  [new URL("./schema.generated.ts", import.meta.url), types],
] as const

for (const [file, content] of outputs) {
  if (!checkOnly) {
    await writeFile(file, content)
  } else if ((await readFile(file, "utf8").catch(() => "")) !== content) {
    console.error(
      "The OpenAPI document is not what the operations say. Run `npm run openapi` and commit the result.",
    )
    process.exitCode = 1
    break
  }
}
