import type { Metadata } from "next"
import { notFound } from "next/navigation"
import { SheetView } from "@/app/report/sheet-view"
import { openAccountFor } from "@/app/session"
import { PageHead } from "@/app/ui/sheet"
import { Day } from "@/app/ui/time"
import { can } from "@/lib/accounts"
import { TarnwrightError } from "@/lib/errors"
import { type Report, reportKinds, sharedUrl, showReport } from "@/lib/reports"
import { HandOver } from "./hand-over"

interface OfReport {
  params: Promise<{ account: string; report_id: string }>
}

export const metadata: Metadata = { title: "Report" }

export default async function ReportPage({ params }: OfReport) {
  const { account, actor, ctx } = await openAccountFor("report.read", params)
  const { report_id } = await params
  const report = await showReport({ ctx, input: { report_id } }).catch(absent)
  const { id, kind, title, shopper, created_at, created_by, share_slug } = report
  return (
    <>
      <PageHead
        title={title}
        lead={
          <>
            {reportKinds[kind]}
            {shopper && <>, for {shopper}</>}, made on <Day at={created_at.toISOString()} />
          </>
        }
      />
      <HandOver
        account={account.slug}
        report={{ id, title, shared_url: share_slug === null ? null : sharedUrl(share_slug) }}
        manages={can(actor, "report.manage", { by: created_by })}
      />
      <SheetView report={report} />
    </>
  )
}

function absent(error: unknown): Report {
  if (error instanceof TarnwrightError && error.code === "not_found") notFound()
  throw error
}
