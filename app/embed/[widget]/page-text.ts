import type { ShownWidget } from "@/lib/widgets"

interface EmbedPage {
  readonly widget_id: string
  readonly shown: ShownWidget
  /** Origin of the page around it; null: nobody is told how tall the widget is. */
  readonly parent: string | null
  readonly lang: string | null
  readonly theme: string | null
  /** Where a shopper goes when the widget cannot load. */
  readonly home: string | null
}

/** The page of a framed widget: the element, its loader, and the script that tells its height. */
export function embedPage({ widget_id, shown, parent, lang, theme, home }: EmbedPage): string {
  const attributes = [
    `widget-id="${escaped(widget_id)}"`,
    `settings="${escaped(JSON.stringify(shown))}"`,
    lang && `lang="${escaped(lang)}"`,
    theme && `theme="${escaped(theme)}"`,
  ]
  return `<!doctype html>
<html lang="${escaped(lang ?? "en")}">
<meta charset="utf-8">
<meta name="viewport" content="width=device-width">
<meta name="color-scheme" content="light dark">
<meta name="robots" content="noindex">
<title>Calculator</title>
<body${parent ? ` data-parent="${escaped(parent)}"` : ""}>
<tarnwright-widget ${attributes.filter(Boolean).join(" ")}>${
    home ? `<a href="${escaped(home)}" target="_top">${escaped(new URL(home).host)}</a>` : ""
  }</tarnwright-widget>
<script type="module" src="/w/v1/loader.js"></script>
<script type="module" src="/w/v1/embed.js"></script>
`
}

/** What a frame shows whose widget is not there, or is switched off. */
export function missingPage(): string {
  return `<!doctype html>
<html lang="en">
<meta charset="utf-8">
<meta name="robots" content="noindex">
<title>No calculator</title>
<p>There is no calculator here.</p>
`
}

const entities: Record<string, string> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
}

function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (character) => entities[character] ?? character)
}
