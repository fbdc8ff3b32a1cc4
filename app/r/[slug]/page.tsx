import type { Metadata } from "next"
import { notFound } from "next/navigation"
import { PrintButton } from "@/app/report/print-button"
import { SheetView } from "@/app/report/sheet-view"
import { ButtonLink } from "@/app/ui/button"
import { PageHead } from "@/app/ui/sheet"
import { Day } from "@/app/ui/time"
import { TarnwrightError } from "@/lib/errors"
import { readSharedReport, type SharedReport } from "@/lib/reports"

interface OfSlug {
  params: Promise<{ slug: string }>
}

// Whoever has the address may read it; nobody is to find it by searching.
export const metadata: Metadata = { title: "Report", robots: { index: false, follow: false } }

export default async function SharedReportPage({ params }: OfSlug) {
  const { slug } = await params
  const report = await found(slug)
  return (
    <main className="mx-auto max-w-6xl px-5 py-10 sm:px-8 print:p-0">
      <p className="flex flex-wrap gap-x-4 text-sm text-soft">
        <span className="font-semibold text-ink">{report.account_name}</span>
        <Day at={report.created_at.toISOString()} />
      </p>
      <PageHead
        title={report.title}
        lead={report.answer.method.name}
        actions={
          <div className="flex gap-3 print:hidden">
            <PrintButton />
            <ButtonLink href={`/r/${slug}/pdf`} prefetch={false}>
              Save as PDF
            </ButtonLink>
          </div>
        }
      />
      <SheetView report={report} />
    </main>
  )
}

async function found(slug: string): Promise<SharedReport> {
  try {
    return await readSharedReport(slug)
  } catch (error) {
    if (error instanceof TarnwrightError && error.code === "not_found") notFound()
    throw error
  }
}
