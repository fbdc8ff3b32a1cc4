import { CopyButton } from "./copy-button"

/** A piece of code or a command, to be read and copied. */
export function CodeBlock({ code, what, wrap = false }: { code: string; what: string; wrap?: boolean }) {
  return (
    <figure className="border-y border-line bg-sunk">
      <figcaption className="flex items-center justify-between gap-4 py-1.5 pr-2 pl-4 text-sm text-soft">
        {what}
        <CopyButton text={code} what={what} />
      </figcaption>
      <pre
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
        tabIndex={0}
        className={`overflow-x-auto px-4 pb-4 text-[0.8125rem] leading-6 ${wrap ? "break-all whitespace-pre-wrap" : ""}`}
      >
        {code}
      </pre>
    </figure>
  )
}
