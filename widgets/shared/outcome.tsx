import type { ReactNode } from "react"
import type { Caution } from "@/lib/chemistry/answer"
import { Cautions } from "./cautions"
import type { SharedMessages } from "./messages/shared-messages"
import { useSettled } from "./settled"

interface OutcomeProps {
  /** Whether the answer is of what stands in the fields. */
  readonly isCurrent: boolean
  readonly messages: SharedMessages
  /** Figures and drawings, for the eye. */
  readonly reading: ReactNode
  /** The whole answer in words, for the eye and for a screen reader. */
  readonly sentence: string
  readonly cautions: readonly Caution[]
  say(caution: Caution): string | undefined
  /** What follows the sentence. */
  readonly children?: ReactNode
}

/** An answer: figures, a sentence that is announced when it has come to rest, and what to keep in mind beside it. */
export function Outcome(props: OutcomeProps) {
  const { isCurrent, messages, reading, cautions, say, children } = props
  const sentence = useSettled(props.sentence)
  return (
    <div className="outcome" part="outcome" data-current={isCurrent}>
      <div className="reading" aria-hidden="true">
        {reading}
      </div>
      {/* biome-ignore lint/a11y/noRedundantRoles: some screen readers know the role and not the element. */}
      <output className="sentence" part="sentence" role="status" aria-live="polite">
        {sentence}
      </output>
      {!isCurrent && <p className="stale">{messages.lastResult}</p>}
      {children}
      <Cautions cautions={cautions} messages={messages} say={say} />
    </div>
  )
}

interface FigureProps {
  readonly title: string
  readonly figure: string
  readonly unit?: string
  /** A word that judges the figure, beside it. */
  readonly beside?: ReactNode
  readonly interval?: string
}

/** A number larger than its label, its unit beside it, its interval under it. */
export function Figure({ title, figure, unit, beside, interval }: FigureProps) {
  return (
    <>
      <p className="label">{title}</p>
      <p className="line">
        <span className="figure" part="figure">
          {figure}
          {unit && <span className="figure-unit"> {unit}</span>}
        </span>
        {beside}
      </p>
      {interval && <p className="interval-text">{interval}</p>}
    </>
  )
}

/** Smaller figures beside the main one: a name and a value each. */
export function Facts({ rows }: { readonly rows: readonly (readonly [name: string, value: ReactNode])[] }) {
  return (
    <dl className="facts" part="facts">
      {rows.map(([name, value]) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd>{value}</dd>
        </div>
      ))}
    </dl>
  )
}
