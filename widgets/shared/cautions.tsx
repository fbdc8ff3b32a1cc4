import type { Caution } from "@/lib/chemistry/answer"
import type { SharedMessages } from "./messages/shared-messages"

interface CautionsProps {
  readonly cautions: readonly Caution[]
  readonly messages: SharedMessages
  /** The caution in the shopper's language; undefined: the engine's own English words are shown. */
  say(caution: Caution): string | undefined
}

/** Everything to keep in mind about a result, the gravest first. */
export function Cautions({ cautions, messages, say }: CautionsProps) {
  return (
    <ul className="cautions" part="cautions" aria-label={messages.cautionsTitle}>
      {cautions.map((caution) => {
        const text = say(caution)
        return (
          <li key={caution.code} className={`caution ${caution.severity}`} part="caution">
            <strong className="severity">{messages.severity[caution.severity]}</strong>
            <span lang={text === undefined ? "en" : undefined}>{text ?? caution.message}</span>
          </li>
        )
      })}
    </ul>
  )
}
