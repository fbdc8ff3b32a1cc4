import type { Method } from "@/lib/chemistry/answer"
import type { SharedMessages } from "./messages/shared-messages"

interface MethodViewProps {
  readonly method: Method
  readonly messages: SharedMessages
  /** How the calculator works, in the shopper's language. */
  readonly explanation: string
}

/** How a result was worked out, with its sources, for those who ask. */
export function MethodView({ method, messages, explanation }: MethodViewProps) {
  return (
    <details className="details" part="method">
      <summary>{messages.methodTitle}</summary>
      <p>{explanation}</p>
      <p className="aside">{messages.sourcesTitle}</p>
      <ul className="sources" lang="en">
        {method.sources.map(({ title, year, detail }) => (
          <li key={title}>
            {title} ({year}). {detail}.
          </li>
        ))}
      </ul>
      <p className="aside">{messages.engine(method.version)}</p>
    </details>
  )
}
