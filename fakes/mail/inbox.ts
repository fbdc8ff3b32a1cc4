import { randomUUID } from "node:crypto"
import type { ParsedMail } from "mailparser"

/** A mail as it was caught. `html` is what the sender wrote, unchanged. */
export interface CaughtMail {
  readonly id: string
  readonly received_at: string
  readonly message_id: string | null
  readonly from: string
  /** Addresses of the envelope, in lower case: where the mail would have gone, whatever its header says. */
  readonly to: readonly string[]
  readonly subject: string
  readonly text: string
  readonly html: string | null
}

/** The newest mails, at most `capacity`; a mail that was delivered again under its Message-ID replaces the first. */
export function createInbox(capacity: number) {
  let mails: CaughtMail[] = []

  return {
    add(mail: ParsedMail, recipients: readonly string[]): void {
      const message_id = mail.messageId ?? null
      const caught: CaughtMail = {
        id: randomUUID(),
        received_at: new Date().toISOString(),
        message_id,
        from: mail.from?.text ?? "",
        to: recipients.map((address) => address.toLowerCase()),
        subject: mail.subject ?? "",
        text: mail.text ?? "",
        html: mail.html || null,
      }
      const others = mails.filter((each) => message_id === null || each.message_id !== message_id)
      mails = [caught, ...others].slice(0, capacity)
    },

    /** Newest first; those for one address when it is given. */
    list(to?: string): CaughtMail[] {
      if (to === undefined) return mails
      return mails.filter((mail) => mail.to.includes(to.toLowerCase()))
    },

    find(id: string): CaughtMail | undefined {
      return mails.find((mail) => mail.id === id)
    },

    clear(): void {
      mails = []
    },
  }
}
