import type { Letter } from "../compose"

export interface SharedReportData {
  account_name: string
  title: string
  /** The answer in a sentence or two. */
  summary: readonly string[]
  /** What must be known beside it, the gravest first. */
  cautions: readonly string[]
  url: string
}

/** A report that the counter sends to a customer. */
export function sharedReport({ account_name, title, summary, cautions, url }: SharedReportData): Letter {
  return {
    subject: `${title}, from ${account_name}`,
    paragraphs: [
      `${account_name} has worked this out for you: “${title}”.`,
      ...summary,
      ...cautions,
      "The whole sheet, with its parts list, its drawing and every caution, is behind the link. It replaces neither the manual of the equipment, nor local codes, nor licensed practice.",
    ],
    action: { label: "Open the report", url },
    reason: `${account_name} sent you this because you asked for it. We keep your address for nothing else.`,
  }
}
