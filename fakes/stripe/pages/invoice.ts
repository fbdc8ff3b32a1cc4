import { settle } from "../billing/collection"
import type { Invoice } from "../billing/invoices"
import type { Fake } from "../core/fake"
import { day, document, type Html, html, money } from "./html"
import type { Page } from "./page"

/** The hosted page of one invoice, from which an open one can be paid. */
export function invoicePage(fake: Fake, page: Page): string | { to: string } {
  const invoice = fake.get("invoice", page.id)
  if (page.method === "POST") {
    const declined = settle(fake, invoice, true)
    if (declined) return document(title(invoice), sheet(invoice, declined.message))
    return { to: `${fake.base}/invoice/${invoice.id}` }
  }
  return document(title(invoice), sheet(invoice, null))
}

/** Rows of invoices; an open one gets a button that posts its id to `payAt`. */
export function invoiceTable(invoices: Invoice[], payAt: string): Html {
  if (invoices.length === 0) return html`<p>There are none yet.</p>`
  const rows = invoices.map(
    (invoice) => html`<tr>
<td><a href="/invoice/${invoice.id}">${invoice.number}</a><br><span class="note">${day(invoice.created)}, ${invoice.status ?? ""}</span></td>
<td>${money(invoice.total, invoice.currency)}${invoice.status === "open" ? payForm(invoice, payAt) : ""}</td></tr>`,
  )
  return html`<table>${rows}</table>`
}

function payForm(invoice: Invoice, payAt: string): Html {
  return html`<form method="post" action="${payAt}"><input type="hidden" name="invoice" value="${invoice.id}">
<button class="plain">Pay it now</button></form>`
}

function sheet(invoice: Invoice, problem: string | null): Html {
  const lines = invoice.lines.data.map(
    (
      line,
    ) => html`<tr><td>${line.description}<br><span class="note">${day(line.period.start)} to ${day(line.period.end)}</span></td>
<td>${money(line.amount, line.currency)}</td></tr>`,
  )
  return html`<h1>${title(invoice)}</h1>
<p class="note">${day(invoice.created)}, ${invoice.status ?? ""}. For ${invoice.customer_name ?? invoice.customer_email ?? ""}</p>
${problem ? html`<p class="problem" role="alert">${problem}</p>` : ""}
<table>${lines}
<tr class="total"><td>Total</td><td>${money(invoice.total, invoice.currency)}</td></tr>
<tr class="total"><td>Left to pay</td><td>${money(invoice.amount_remaining, invoice.currency)}</td></tr></table>
${invoice.status === "open" ? html`<form method="post" action="/invoice/${invoice.id}" class="acts"><button>Pay ${money(invoice.amount_remaining, invoice.currency)}</button></form>` : ""}`
}

function title(invoice: Invoice): string {
  return `Invoice ${invoice.number ?? "(draft)"}`
}
