import { enqueueJob, type Trx } from "@/db"
import type { Mail } from "./letters"

/** Name of the job that sends a mail; `scripts/worker.ts` has its task. */
export const SEND_MAIL = "send_mail"

/** Puts a mail on the queue in the caller's transaction: it is sent if, and only if, that commits. */
export async function enqueueMail(trx: Trx, mail: Mail): Promise<void> {
  await enqueueJob(trx, { task: SEND_MAIL, payload: mail })
}
