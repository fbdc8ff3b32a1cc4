import { heightIn } from "./shared/height-message"
import type { Mount } from "./shared/mount"

/** The widget in a frame of its own, as tall as what it holds: for pages that keep foreign scripts out. */
export const mount: Mount = async (host, { widgetUrl, ending }) => {
  if (ending.aborted) return
  const { origin, pathname } = new URL(widgetUrl)
  const address = new URL(`/embed/${pathname.split("/").at(-1)}`, origin)
  address.searchParams.set("parent", location.origin)
  const lang = host.getAttribute("lang") ?? host.closest("[lang]")?.getAttribute("lang")
  if (lang) address.searchParams.set("lang", lang)
  address.searchParams.set("theme", host.getAttribute("theme") ?? schemeOf(host))
  const frame = Object.assign(document.createElement("iframe"), {
    src: address.href,
    title: host.getAttribute("title") ?? "Tarnwright",
    width: "100%",
    height: String(host.clientHeight || 720),
    referrerPolicy: "origin",
  })
  frame.style.cssText = "display:block;border:0"

  function onMessage({ origin: from, source, data }: MessageEvent): void {
    if (from !== origin || source !== frame.contentWindow) return
    const height = heightIn(data)
    if (height !== null) frame.height = String(height)
  }

  window.addEventListener("message", onMessage, { signal: ending })
  const shadow = host.shadowRoot ?? host.attachShadow({ mode: "open" })
  shadow.replaceChildren(frame)
  ending.addEventListener("abort", () => shadow.replaceChildren())
}

/** A frame cannot see the page's colour scheme: `page` where the page has both and the visitor's system decides. */
function schemeOf(host: HTMLElement): "light" | "dark" | "page" {
  const schemes = getComputedStyle(host).colorScheme
  if (!schemes.includes("dark")) return "light"
  return schemes.includes("light") ? "page" : "dark"
}
