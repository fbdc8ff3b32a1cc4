import { type ReactNode, useEffect } from "react"

export interface TarnwrightWidgetProps {
  readonly widgetId: string
  /** Address of the loader, as https://app.example/w/v1/loader.js. */
  readonly loaderUrl: string
  /** Instead of the page's own language, as de or es-MX. */
  readonly lang?: string
  readonly theme?: "page" | "light" | "dark"
  readonly mode?: "element" | "iframe"
  /** Height in CSS pixels that is kept free until the widget is there, so that nothing on the page jumps. */
  readonly minHeight?: number
  readonly className?: string
  /** What stands there until the widget has loaded, and if it cannot. */
  readonly children?: ReactNode
}

/** `<tarnwright-widget>` as a React component. Renders on a server too; the loader is added once, in the browser. */
export function TarnwrightWidget(props: TarnwrightWidgetProps) {
  const { widgetId, loaderUrl, minHeight = 720, children, ...attributes } = props

  useEffect(() => {
    if (document.querySelector(`script[src="${CSS.escape(loaderUrl)}"]`)) return
    document.head.append(
      Object.assign(document.createElement("script"), { type: "module", async: true, src: loaderUrl }),
    )
  }, [loaderUrl])

  return (
    <tarnwright-widget widget-id={widgetId} style={{ display: "block", minHeight }} {...attributes}>
      {children}
    </tarnwright-widget>
  )
}

declare module "react" {
  namespace JSX {
    interface IntrinsicElements {
      "tarnwright-widget": React.HTMLAttributes<HTMLElement> & {
        readonly "widget-id": string
        readonly theme?: string
        readonly mode?: string
        readonly settings?: string
      }
    }
  }
}
