import { sql } from "kysely"
import { asWorker, type Trx } from "@/db"
import { env } from "@/lib/env"
import { enqueueMail } from "@/lib/mail"
import { archiveOf, type Part, type Row } from "./archive"
import { EXPORT_DAYS } from "./request"
import { files } from "./tables"

/** Makes an archive that was asked for and tells whoever asked. Does nothing when it is there already. */
export async function buildExport(input: { account_id: string; export_id: string }): Promise<void> {
  await asWorker(async (trx) => {
    const asked = await trx
      .selectFrom("account_export")
      .innerJoin("account", "account.id", "account_export.account_id")
      .innerJoin("app_user", "app_user.id", "account_export.requested_by")
      .select(["account.name as account_name", "account.slug", "app_user.name", "app_user.email"])
      .where("account_export.account_id", "=", input.account_id)
      .where("account_export.id", "=", input.export_id)
      .where("account_export.finished_at", "is", null)
      .forUpdate("account_export")
      .skipLocked()
      .executeTakeFirst()
    if (!asked) return
    const parts: Part[] = []
    for (const [name, { table, columns }] of Object.entries(files)) {
      parts.push({ name, columns, rows: await rowsOf(trx, input.account_id, table, columns) })
    }
    const now = new Date()
    await trx
      .updateTable("account_export")
      .set({ archive: Buffer.from(archiveOf(parts, aboutOf(asked.account_name, now))), finished_at: now })
      .where("account_id", "=", input.account_id)
      .where("id", "=", input.export_id)
      .execute()
    await enqueueMail(trx, {
      template: "export_ready",
      to: asked.email,
      data: {
        name: asked.name,
        account_name: asked.account_name,
        days: EXPORT_DAYS,
        url: `${env().PUBLIC_URL}/portal/${asked.slug}/settings#export`,
      },
    })
  })
}

async function rowsOf(
  trx: Trx,
  account_id: string,
  table: string,
  columns: readonly string[],
): Promise<readonly Row[]> {
  const { rows } = await sql<Row>`select ${sql.join(columns.map((column) => sql.ref(column)))}
    from ${sql.table(table)} where ${sql.ref(table === "account" ? "id" : "account_id")} = ${account_id}
    order by 1`.execute(trx)
  return rows
}

function aboutOf(account_name: string, now: Date): string {
  return `${account_name} on Tarnwright, as of ${now.toISOString()}.

Each list is here twice: in json/ for programs, in csv/ for spreadsheets. Amounts are in
the smallest unit of their currency, times are in UTC. Keys and secrets are not in it: we
keep digests of them alone. Enquiries are personal data of those who wrote them: pass them
on to nobody whom they did not agree to, and delete this file when you no longer need it.
`
}
