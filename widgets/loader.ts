/**
 * What the one script tag loads: it defines `<tarnwright-widget>` and fetches, for each element, what it needs.
 *
 *     <script async type="module" src="https://app.example/w/v1/loader.js"></script>
 *     <tarnwright-widget widget-id="wdgt_…" style="display:block;min-height:720px"><a href="…">…</a></tarnwright-widget>
 *
 * Attributes: `widget-id`; `lang` and `theme` (light, dark, page) instead of the widget's own; `mode="iframe"`;
 * `settings`, the answer of the widget's settings as JSON, where the page already has it. Whatever fails, the content
 * of the element stays and the page sees no error.
 */
import { call } from "./shared/call"
import type { Address, Load, Part } from "./shared/mount"
import type { ShownWidget } from "./shared/shown-widget"

/** Where the calculators and the frame are, put in by the build. */
declare const PARTS: Readonly<Record<string, Address>>

const { origin } = new URL(import.meta.url)
const loaded = new Map<string, Promise<Part>>()

const load: Load = ([path, integrity]) => {
  const src = origin + path
  let part = loaded.get(src)
  if (!part) {
    part = new Promise((onload, onerror) => {
      const tag = document.createElement("script")
      Object.assign(tag, { type: "module", src, integrity, crossOrigin: "anonymous", onload, onerror })
      document.head.append(tag)
      // The module that was verified, not a second one: an address is one module on a page.
    }).then(() => import(src))
    loaded.set(src, part)
  }
  return part
}

class TarnwrightWidget extends HTMLElement {
  static observedAttributes = ["widget-id", "lang", "theme", "mode", "settings"]

  /** What is shown, or being fetched, as its attributes say. */
  #shown = ""
  #isDue = false
  #ending: AbortController | undefined

  connectedCallback() {
    this.#changed()
  }

  disconnectedCallback() {
    this.#changed()
  }

  attributeChangedCallback() {
    this.#changed()
  }

  /** Looks once at what several changes at once have led to; an element that was only moved keeps its content. */
  #changed() {
    if (this.#isDue) return
    this.#isDue = true
    queueMicrotask(() => {
      this.#isDue = false
      const wanted = this.isConnected
        ? TarnwrightWidget.observedAttributes.map((name) => this.getAttribute(name)).join("\n")
        : ""
      if (wanted === this.#shown) return
      this.#shown = wanted
      this.#ending?.abort()
      this.#ending = new AbortController()
      if (wanted) this.#show(this.#ending.signal).catch(() => {})
    })
  }

  async #show(ending: AbortSignal) {
    const widgetUrl = `${origin}/api/v1/widgets/${this.getAttribute("widget-id")}`
    const given = this.getAttribute("settings")
    const shown: ShownWidget =
      this.getAttribute("mode") === "iframe"
        ? { calculator: "frame" }
        : given
          ? JSON.parse(given)
          : await (await call(`${widgetUrl}/settings`)).json()
    const { mount } = await load(PARTS[shown.calculator] as Address)
    await mount(this, { shown, widgetUrl, load, ending })
  }
}

if (!customElements.get("tarnwright-widget")) customElements.define("tarnwright-widget", TarnwrightWidget)
