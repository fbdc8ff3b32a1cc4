/**
 * Runs in the page of a framed widget: tells the page around it how tall the widget is. The server put that page's
 * origin into `data-parent` after it found it on the widget's list, so the message reaches nobody else.
 */
import { heightMessage } from "./shared/height-message"

/** At most ten messages a second. @source PLATFORM 4.14 */
const apart_ms = 100

const widget = document.querySelector("tarnwright-widget")
const parentOrigin = document.body.dataset.parent

const sheet = new CSSStyleSheet()
sheet.replaceSync("body{margin:0;font-family:system-ui,sans-serif}")
document.adoptedStyleSheets = [sheet]

if (widget && parentOrigin && window.parent !== window) {
  let told = 0
  let isDue = false

  const tell = () => {
    isDue = false
    // The widget's own height, which does not hang on the frame's, so that the two cannot push each other.
    const message = heightMessage(widget.getBoundingClientRect().height)
    if (message.height === told) return
    told = message.height
    window.parent.postMessage(message, parentOrigin)
  }

  new ResizeObserver(() => {
    if (isDue) return
    isDue = true
    setTimeout(tell, apart_ms)
  }).observe(widget)
}
