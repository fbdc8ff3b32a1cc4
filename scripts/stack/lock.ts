import { readFileSync, rmSync, writeFileSync } from "node:fs"
import path from "node:path"
import { SetupError } from "./progress"

interface Owner {
  pid: number
  /** When the process began, so that a process id that came round again is not taken for it. */
  began: string
}

/**
 * Takes the data folder for this process and returns how to give it back.
 *
 * @throws SetupError when a living process has it.
 */
export function lockDataDir(dataDir: string): () => void {
  const file = path.join(dataDir, "running.json")
  const owner = readOwner(file)
  if (owner && owner.pid !== process.pid && began(owner.pid) === owner.began) {
    const hint = `End process ${owner.pid}, or set TARN_DATA_DIR and PORT to run a second one.`
    throw new SetupError(`Tarnwright already runs with the data folder ${dataDir}. ${hint}`)
  }
  const mine: Owner = { pid: process.pid, began: began(process.pid) ?? "" }
  writeFileSync(file, `${JSON.stringify(mine)}\n`)
  return () => rmSync(file, { force: true })
}

function readOwner(file: string): Owner | undefined {
  try {
    return JSON.parse(readFileSync(file, "utf8"))
  } catch {
    return undefined
  }
}

/** Start time of a process in clock ticks since boot (proc(5), field 22), undefined when there is none. */
function began(pid: number): string | undefined {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8")
    return stat.slice(stat.lastIndexOf(")") + 2).split(" ")[19]
  } catch {
    return undefined
  }
}
