import { Wordmark } from "@/app/ui/wordmark"

export default function ReportNotFound() {
  return (
    <main className="mx-auto max-w-measure px-5 py-16">
      <Wordmark />
      <h1 className="mt-10 text-3xl">This report is not shared, or no longer</h1>
      <p className="mt-3 text-soft">
        The shop that made it can end its sharing, and an address that was copied in part leads nowhere. Ask
        the shop for a new link.
      </p>
    </main>
  )
}
