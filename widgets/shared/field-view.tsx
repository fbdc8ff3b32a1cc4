import { useId } from "react"
import { type Field, type FieldKind, type FieldProblem, shownValue, symbolOf } from "./field"
import { type Locale, numberWriter } from "./locale"
import type { SharedMessages } from "./messages/shared-messages"

interface FieldViewProps {
  readonly kind: FieldKind
  readonly field: Field
  readonly label: string
  readonly locale: Locale
  readonly messages: SharedMessages
  /** Why the engine refuses the value, though as a number it is good. */
  readonly refusal: string | null
  onType(text: string): void
  onSlide(shown: number): void
  onUnit(unit: string): void
}

/** One quantity: a slider for the hand, a number field for the exact value, a choice of units where there is one. */
export function FieldView(props: FieldViewProps) {
  const { kind, field, label, locale, messages, refusal, onType, onSlide, onUnit } = props
  const id = useId()
  const write = numberWriter(locale)
  const { unit } = field
  const symbol = symbolOf(unit)
  const shown = shownValue(field.value, unit)
  const written = withSymbol(write(shown, unit.decimals), symbol)
  const problem = field.problem ? messages.problems[field.problem](label, limitOf(field.problem)) : refusal

  function limitOf(problem: FieldProblem): string {
    return withSymbol(
      write(shownValue(problem === "too_low" ? kind.min : kind.max, unit), unit.decimals),
      symbol,
    )
  }

  return (
    <div className="field" part="field">
      <label className="label" part="label" htmlFor={`${id}number`}>
        {label}
        {symbol && <span className="unseen">, {symbol}</span>}
      </label>
      <input
        className="number"
        part="number"
        id={`${id}number`}
        type="text"
        inputMode="decimal"
        autoComplete="off"
        spellCheck={false}
        value={field.text}
        aria-invalid={problem !== null}
        aria-describedby={problem === null ? undefined : `${id}problem`}
        onInput={({ currentTarget }) => onType(currentTarget.value)}
      />
      {kind.units.length > 1 ? (
        <select
          className="unit"
          part="unit"
          aria-label={messages.unitOf(label)}
          value={unit.id ?? ""}
          onChange={({ currentTarget }) => onUnit(currentTarget.value)}
        >
          {kind.units.map((each) => (
            <option key={each.id} value={each.id ?? ""}>
              {symbolOf(each)}
            </option>
          ))}
        </select>
      ) : (
        <span className="unit" />
      )}
      <input
        className="slider"
        part="slider"
        type="range"
        aria-label={label}
        aria-valuetext={written}
        min={unit.from}
        max={unit.to}
        step={unit.step}
        value={shown}
        onInput={({ currentTarget }) => onSlide(currentTarget.valueAsNumber)}
      />
      {problem !== null && (
        <p className="problem" part="problem" id={`${id}problem`}>
          {problem}
        </p>
      )}
    </div>
  )
}

function withSymbol(text: string, symbol: string): string {
  return symbol === "" ? text : `${text} ${symbol}`
}
