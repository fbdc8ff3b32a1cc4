import { createTransport, type Transporter } from "nodemailer"
import { env } from "@/lib/env"
import type { Mail } from "./letters"
import { renderMail } from "./render"

const timeout_ms = 10_000

let transport: Transporter | undefined

/**
 * Sends one mail now. `id` becomes its Message-ID: a job that is run again after its answer was lost sends the same
 * one, and a mail server may drop the second.
 *
 * @throws Error when the mail server does not take it within ten seconds; the queue tries again.
 */
export async function deliverMail(mail: Mail, id: string): Promise<void> {
  transport ??= createTransport(
    {
      url: env().SMTP_URL,
      connectionTimeout: timeout_ms,
      greetingTimeout: timeout_ms,
      socketTimeout: timeout_ms,
    },
    { from: env().MAIL_FROM },
  )
  const messageId = `<${id}@${new URL(env().PUBLIC_URL).hostname}>`
  await transport.sendMail({ to: mail.to, messageId, ...renderMail(mail) })
}
