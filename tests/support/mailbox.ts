import { stack } from "./stack"

export interface CaughtMail {
  id: string
  to: string[]
  subject: string
  text: string
  html: string | null
}

/** Waits for the newest mail to an address whose subject holds `subject`; fails after `within_ms`. */
export async function waitForMail(to: string, subject = "", within_ms = 15_000): Promise<CaughtMail> {
  const giveUp = Date.now() + within_ms
  while (Date.now() < giveUp) {
    const found = (await mailsTo(to)).find((mail) => mail.subject.includes(subject))
    if (found) return found
    await new Promise((resolve) => setTimeout(resolve, 100))
  }
  throw new Error(`No mail to ${to} with the subject “${subject}” within ${within_ms} ms`)
}

/** Every mail caught for an address, newest first. */
export async function mailsTo(to: string): Promise<CaughtMail[]> {
  const response = await fetch(`${stack().mailUrl}/messages?to=${encodeURIComponent(to)}`)
  return ((await response.json()) as { data: CaughtMail[] }).data
}

/** The first link to the application in the text of a mail. */
export function linkIn(mail: CaughtMail): string {
  const link = mail.text.match(/https?:\/\/\S+/)?.[0]
  if (!link) throw new Error(`The mail “${mail.subject}” has no link`)
  return link
}
