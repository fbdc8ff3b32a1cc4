/** Text made safe to stand between tags or in a quoted attribute. */
export function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`)
}

/** `html\`<p>${text}</p>\`` escapes what is put in, unless it is itself made by `html`. */
export function html(
  parts: TemplateStringsArray,
  ...values: (Html | string | number | null | Html[])[]
): Html {
  const text = parts
    .map((part, index) => part + (index < values.length ? shown(values[index]!) : ""))
    .join("")
  return new Html(text)
}

export class Html {
  constructor(readonly text: string) {}
}

function shown(value: Html | string | number | null | Html[]): string {
  if (value instanceof Html) return value.text
  if (Array.isArray(value)) return value.map((one) => one.text).join("")
  return value === null ? "" : escaped(String(value))
}

/** `1,234.50 USD`, from minor units of a currency with two decimals. */
export function money(amount: number, currency: string): string {
  const figure = new Intl.NumberFormat("en-US", { minimumFractionDigits: 2 }).format(amount / 100)
  return `${figure} ${currency.toUpperCase()}`
}

/** `1 December 2026` in UTC. */
export function day(seconds: number): string {
  return new Intl.DateTimeFormat("en-GB", { dateStyle: "long", timeZone: "UTC" }).format(seconds * 1000)
}

/** A whole page in the look of this stand-in: a paper form under a striped band that says nothing here is real. */
export function document(title: string, body: Html): string {
  return html`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="robots" content="noindex">
<link rel="icon" href="data:,">
<title>${title} · practice payments</title>
<style>${new Html(STYLE)}</style>
</head>
<body>
<p class="band">Practice payments: no card is charged and no money moves</p>
<main>
${body}
</main>
</body>
</html>
`.text
}

const STYLE = `
:root { color-scheme: light; font: 16px/1.5 Georgia, "Times New Roman", serif; color: #222; background: #ece7da; }
body { margin: 0; }
.band { margin: 0; padding: 8px 16px; text-align: center; background: repeating-linear-gradient(135deg, #f4d9a8 0 12px, #efcd90 12px 24px); border-bottom: 1px solid #8a6d2f; font-size: 14px; }
main { max-width: 560px; margin: 24px auto; padding: 24px; background: #fffdf7; border: 1px dashed #7d7666; box-sizing: border-box; }
@media (max-width: 600px) { main { margin: 0; padding: 16px; border-width: 0 0 1px; } }
h1 { margin: 0 0 8px; font-size: 24px; line-height: 1.25; }
h2 { margin: 28px 0 8px; font-size: 18px; border-bottom: 1px solid #c9c1ad; }
table { width: 100%; border-collapse: collapse; }
td, th { padding: 6px 0; text-align: left; vertical-align: top; font-weight: normal; border-bottom: 1px dotted #c9c1ad; }
td:last-child, th:last-child { text-align: right; padding-left: 12px; white-space: nowrap; }
.total td { font-weight: bold; border-bottom: 0; }
fieldset { margin: 16px 0; padding: 8px 16px; border: 1px solid #7d7666; }
legend { padding: 0 6px; }
label { display: flex; gap: 10px; align-items: baseline; padding: 8px 0; cursor: pointer; }
button { font: inherit; padding: 10px 18px; min-height: 44px; border: 1px solid #222; background: #222; color: #fffdf7; cursor: pointer; }
button.plain { background: transparent; color: #222; }
button:focus-visible, a:focus-visible, input:focus-visible { outline: 3px solid #8a6d2f; outline-offset: 2px; }
.acts { display: flex; flex-wrap: wrap; gap: 12px; align-items: center; margin-top: 16px; }
.acts form { margin: 0; }
.problem { margin: 16px 0; padding: 10px 14px; border: 2px solid #8c1d1d; background: #fbeaea; }
.note { color: #55503f; font-size: 15px; }
a { color: #222; }
`
