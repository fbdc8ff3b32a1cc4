/**
 * Runs the engine on files of reference values and prints how far it is from them:
 *
 *     npm run reference                  the files of tests/reference
 *     npm run reference -- FILE…         any files with the same columns, rows in any order
 *
 * Ends with 1 when a row is outside its tolerance, when a kind is unknown, or when a file cannot be read.
 */
import { readdirSync } from "node:fs"
import { join } from "node:path"
import { formats } from "./reference/formats"
import { reportFile } from "./reference/report"

const given = process.argv.slice(2)
let failures = 0
for (const file of given.length > 0 ? given : shippedFiles()) {
  const report = reportFile(file, formats)
  console.log(`\n${report.text}`)
  failures += report.failures
}
console.log(failures === 0 ? "\nAll rows pass." : `\n${failures} failed.`)
process.exitCode = failures === 0 ? 0 : 1

function shippedFiles(): string[] {
  const folder = join(import.meta.dirname, "../tests/reference")
  return readdirSync(folder)
    .filter((name) => name.endsWith(".csv"))
    .sort()
    .map((name) => join(folder, name))
}
