import type { Language } from "./languages"

/** A mail ready to send. */
export interface Message {
  readonly subject: string
  readonly text: string
  readonly html: string
}

/** What a letter says, without its form. */
export interface Letter {
  /** Default: English, as everything that a team receives. */
  readonly language?: Language
  readonly subject: string
  /** Paragraphs of plain text; what comes from people is escaped here and needs no care in a letter. */
  readonly paragraphs: readonly string[]
  /** The one thing to do, shown as a link after the paragraphs. */
  readonly action?: { readonly label: string; readonly url: string }
  /** Why this mail came and what to do when it should not have. */
  readonly reason: string
}

/** A letter as plain text and as HTML that needs no image, no script and no external style. */
export function compose(letter: Letter): Message {
  const { paragraphs, action, reason, language = "en" } = letter
  // A header is one line, and a name that someone typed may be part of it.
  const subject = letter.subject.replace(/\s+/g, " ").trim()
  const link = action ? [`${action.label}:\n${action.url}`] : []
  const text = `${[...paragraphs, ...link, `--\nTarnwright. ${reason}`].join("\n\n")}\n`
  const html = `<!doctype html>
<html lang="${language}">
<head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escapeHtml(subject)}</title></head>
<body style="margin:0;padding:24px;background:#f4f6f6;color:#16201f;font:16px/1.5 system-ui,sans-serif">
<div style="max-width:34rem;margin:0 auto;padding:24px;background:#ffffff;border:1px solid #d5dddb;border-radius:8px">
${paragraphs.map((paragraph) => `<p style="margin:0 0 16px;white-space:pre-line">${escapeHtml(paragraph)}</p>`).join("\n")}
${action ? button(action, orCopy[language]) : ""}
</div>
<p style="max-width:34rem;margin:16px auto 0;font-size:14px;color:#4c5b59">Tarnwright. ${escapeHtml(reason)}</p>
</body>
</html>
`
  return { subject, text, html }
}

const orCopy: Record<Language, string> = {
  en: "Or copy this address:",
  de: "Oder diese Adresse kopieren:",
  es: "O copie esta dirección:",
  ja: "または次のアドレスをコピーしてください：",
}

function button({ label, url }: { label: string; url: string }, orCopy: string): string {
  const style = "display:inline-block;padding:10px 16px;background:#0c5c56;color:#ffffff;border-radius:6px"
  return `<p style="margin:24px 0 16px"><a href="${escapeHtml(url)}" style="${style}">${escapeHtml(label)}</a></p>
<p style="margin:0;font-size:14px;color:#4c5b59;overflow-wrap:anywhere">${orCopy} ${escapeHtml(url)}</p>`
}

function escapeHtml(text: string): string {
  return text
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;")
    .replaceAll("'", "&#39;")
}
