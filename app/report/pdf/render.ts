import path from "node:path"
import { Worker } from "node:worker_threads"
import type { PrintedReport } from "./document"
import type { Delivery, Order } from "./worker"

// Read by Node as it lies there: the bundler has to leave it alone.
const script = path.join(/* turbopackIgnore: true */ process.cwd(), "app/report/pdf/thread.mjs")

interface Waiting {
  readonly resolve: (file: Uint8Array) => void
  readonly reject: (error: Error) => void
}

let printer: Worker | undefined
const waiting = new Map<number, Waiting>()
let orders = 0

/**
 * A report as the bytes of a PDF file. Setting a plan takes a second or so of a processor, so it is done by one
 * thread beside the server's own, a report after the other; it is started with the first and keeps nobody from ending.
 */
export function renderReport(report: PrintedReport): Promise<Uint8Array> {
  printer ??= startPrinter()
  const id = orders++
  return new Promise((resolve, reject) => {
    waiting.set(id, { resolve, reject })
    printer?.postMessage({ id, report } satisfies Order)
  })
}

function startPrinter(): Worker {
  const worker = new Worker(/* turbopackIgnore: true */ script)
  worker.on("message", (delivery: Delivery) => {
    const order = waiting.get(delivery.id)
    waiting.delete(delivery.id)
    if ("file" in delivery) order?.resolve(delivery.file)
    else order?.reject(new Error(`The report could not be set: ${delivery.problem}`))
  })
  worker.on("error", (error) => fail(worker, error))
  worker.on("exit", (code) => fail(worker, new Error(`The thread that sets reports ended with ${code}`)))
  // Last: a listener would hold the process again.
  worker.unref()
  return worker
}

/** What waits fails, and the next report starts another thread. */
function fail(worker: Worker, error: Error): void {
  if (printer !== worker) return
  printer = undefined
  for (const { reject } of waiting.values()) reject(error)
  waiting.clear()
}
