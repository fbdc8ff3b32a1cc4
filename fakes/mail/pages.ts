import type { CaughtMail } from "./inbox"

export function inboxPage(mails: readonly CaughtMail[]): string {
  const rows = mails.map(
    (mail) => `<li><a href="/mails/${mail.id}">
      <span class="subject">${escapeHtml(mail.subject) || "(no subject)"}</span>
      <span class="meta">${escapeHtml(mail.to.join(", "))}</span>
      <time datetime="${mail.received_at}">${timeOfDay(mail)}</time>
    </a></li>`,
  )
  const empty = `<p class="empty">No mail yet. What the product sends shows here; nothing leaves this machine.</p>`
  return page(
    "Caught mail",
    `<header><h1>Caught mail</h1><p>${mails.length} ${mails.length === 1 ? "mail" : "mails"}, newest first</p></header>
    ${mails.length > 0 ? `<ul>${rows.join("")}</ul>` : empty}`,
  )
}

export function mailPage(mail: CaughtMail): string {
  const frame = mail.html
    ? `<h2>As a mail program shows it</h2>
    <iframe sandbox="allow-popups allow-popups-to-escape-sandbox" title="The mail as HTML"
      srcdoc="${escapeHtml(openLinksOutside(mail.html))}"></iframe>`
    : ""
  return page(
    mail.subject,
    `<header><p><a href="/">All mail</a></p><h1>${escapeHtml(mail.subject)}</h1></header>
    <dl>
      <dt>From</dt><dd>${escapeHtml(mail.from)}</dd>
      <dt>To</dt><dd>${escapeHtml(mail.to.join(", "))}</dd>
      <dt>Received</dt><dd><time datetime="${mail.received_at}">${timeOfDay(mail)}</time></dd>
    </dl>
    <h2>As plain text</h2>
    <pre>${withLinks(mail.text)}</pre>
    ${frame}`,
  )
}

export function missingPage(): string {
  return page(
    "No such mail",
    `<header><h1>No such mail</h1></header>
    <p class="empty">It may have been cleared. <a href="/">See all mail</a></p>`,
  )
}

function timeOfDay(mail: CaughtMail): string {
  return `${mail.received_at.slice(0, 10)} ${mail.received_at.slice(11, 19)} UTC`
}

/** Plain text with its web addresses as links. */
function withLinks(text: string): string {
  return text
    .split(/(https?:\/\/[^\s<>"]+)/)
    .map((part, index) => {
      const safe = escapeHtml(part)
      return index % 2 === 1 ? `<a href="${safe}">${safe}</a>` : safe
    })
    .join("")
}

/** A sandboxed frame may not navigate the page around it, so its links open outside. */
function openLinksOutside(html: string): string {
  return `<base target="_blank">${html}`
}

function escapeHtml(text: string): string {
  return text
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;")
    .replaceAll("'", "&#39;")
}

function page(title: string, body: string): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)}</title>
<style>${style}</style>
</head>
<body><main>${body}</main></body>
</html>
`
}

const style = `
  :root { color-scheme: light dark; --ink: #16201f; --quiet: #4c5b59; --paper: #fff; --ground: #f4f6f6;
    --line: #d5dddb; --link: #0c5c56 }
  @media (prefers-color-scheme: dark) { :root { --ink: #e6eceb; --quiet: #a5b3b1; --paper: #1b2524; --ground: #121918;
    --line: #33403e; --link: #7fd0c7 } }
  * { box-sizing: border-box }
  body { margin: 0; background: var(--ground); color: var(--ink); font: 16px/1.5 system-ui, sans-serif }
  main { max-width: 52rem; margin: 0 auto; padding: 24px 16px 64px }
  h1 { margin: 0; font-size: 24px; overflow-wrap: anywhere }
  h2 { margin: 32px 0 8px; font-size: 16px }
  header p { margin: 0 0 4px; color: var(--quiet) }
  a { color: var(--link) }
  ul { margin: 24px 0; padding: 0; list-style: none; background: var(--paper); border: 1px solid var(--line);
    border-radius: 8px }
  li + li { border-top: 1px solid var(--line) }
  li a { display: grid; grid-template-columns: 1fr auto; gap: 2px 16px; padding: 12px 16px; color: inherit;
    text-decoration: none }
  li a:hover .subject { text-decoration: underline }
  a:focus-visible { outline: 2px solid var(--link); outline-offset: 2px }
  .subject { grid-column: 1 / -1; font-weight: 600; overflow-wrap: anywhere }
  .meta { color: var(--quiet); overflow-wrap: anywhere }
  time { color: var(--quiet); font-variant-numeric: tabular-nums }
  dl { display: grid; grid-template-columns: auto 1fr; gap: 4px 16px; margin: 16px 0 }
  dt { color: var(--quiet) }
  dd { margin: 0; overflow-wrap: anywhere }
  pre, iframe { width: 100%; margin: 0; padding: 16px; background: var(--paper); border: 1px solid var(--line);
    border-radius: 8px }
  pre { font: 14px/1.6 ui-monospace, monospace; white-space: pre-wrap; overflow-wrap: anywhere }
  iframe { height: 32rem; padding: 0; background: #fff }
  .empty { color: var(--quiet) }
  @media (max-width: 30rem) { li a { grid-template-columns: 1fr } }
`
