import type { Metadata } from "next"
import Link from "next/link"
import { PageHead } from "@/app/ui/sheet"
import { problemPath, problems } from "@/lib/api/problem"
import type { ErrorCode } from "@/lib/errors"

export const metadata: Metadata = { title: "Errors" }

export default function Errors() {
  const rows = Object.entries(problems) as [ErrorCode, (typeof problems)[ErrorCode]][]
  return (
    <>
      <PageHead
        title="Errors"
        lead="Every refusal is a problem document (RFC 9457). Its code is stable, its type is the address of the page here, its instance the id of the request. None costs a unit."
      />
      <ul className="divide-y divide-line border-y border-line">
        {rows.map(([code, { status, title }]) => (
          <li key={code}>
            <Link
              href={problemPath(code)}
              className="grid gap-x-6 py-2.5 hover:bg-sunk sm:grid-cols-[3rem_15rem_minmax(0,1fr)]"
            >
              <span className="font-mono text-sm text-soft">{status}</span>
              <span className="font-mono text-sm">{code}</span>
              <span>{title}</span>
            </Link>
          </li>
        ))}
      </ul>
    </>
  )
}
