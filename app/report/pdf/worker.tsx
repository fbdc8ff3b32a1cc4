import { parentPort } from "node:worker_threads"
import { renderToBuffer } from "@react-pdf/renderer"
import { type PrintedReport, ReportDocument } from "./document"

/** One report to print, under a number by which its file is known. */
export interface Order {
  readonly id: number
  readonly report: PrintedReport
}

export type Delivery =
  | { readonly id: number; readonly file: Uint8Array }
  | { readonly id: number; readonly problem: string }

parentPort?.on("message", async ({ id, report }: Order) => {
  try {
    const file: Uint8Array = await renderToBuffer(<ReportDocument report={report} />)
    parentPort?.postMessage({ id, file } satisfies Delivery)
  } catch (error) {
    parentPort?.postMessage({ id, problem: String(error) } satisfies Delivery)
  }
})
