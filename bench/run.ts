/**
 * Runs one benchmark of this folder by its name: `npm run bench -- engine`. Arguments after the name are its own.
 * Each is a module that exports `run`.
 */
import { readdirSync } from "node:fs"

const names = readdirSync(import.meta.dirname)
  .map((file) => file.replace(/\.ts$/, ""))
  .filter((name) => name !== "run")
const [name = "", ...args] = process.argv.slice(2)
if (names.includes(name)) {
  const benchmark: { run(args: readonly string[]): Promise<void> | void } = await import(`./${name}.ts`)
  await benchmark.run(args)
} else {
  console.error(`Give the name of a benchmark: ${names.join(", ")}`)
  process.exitCode = 1
}
