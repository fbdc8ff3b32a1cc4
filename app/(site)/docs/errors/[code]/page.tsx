import type { Metadata } from "next"
import Link from "next/link"
import { notFound } from "next/navigation"
import { CodeBlock } from "@/app/ui/code-block"
import { PageHead, Section } from "@/app/ui/sheet"
import { problemOf, problems } from "@/lib/api/problem"
import { env } from "@/lib/env"
import { type ErrorCode, TarnwrightError } from "@/lib/errors"
import { errorWords } from "../words"

interface OfCode {
  params: Promise<{ code: string }>
}

export async function generateMetadata({ params }: OfCode): Promise<Metadata> {
  return { title: problems[await codeOf(params)].title }
}

export default async function ErrorPage({ params }: OfCode) {
  const code = await codeOf(params)
  const { status, title } = problems[code]
  const { why, mend } = errorWords[code]
  const example = problemOf(new TarnwrightError(code, why), env().PUBLIC_URL, "req_01kbcexample")
  return (
    <>
      <PageHead
        title={title}
        lead={
          <span className="font-mono text-sm">
            {status} {code}
          </span>
        }
      />
      <Section title="What happened">
        <p className="max-w-measure">{why}</p>
      </Section>
      <Section title="How to mend it">
        <p className="max-w-measure">{mend}</p>
      </Section>
      <Section title="As it is sent" note="application/problem+json">
        <CodeBlock what="Problem document" code={JSON.stringify(example, null, 2)} />
      </Section>
      <p>
        <Link className="link" href="/docs/errors">
          All errors
        </Link>
      </p>
    </>
  )
}

async function codeOf(params: OfCode["params"]): Promise<ErrorCode> {
  const { code } = await params
  if (!Object.hasOwn(problems, code)) notFound()
  return code as ErrorCode
}
