interface ChoiceProps<Value extends string> {
  readonly label: string
  readonly value: Value
  /** What can be chosen, in order, with its words. */
  readonly options: Readonly<Record<Value, string>>
  onChange(value: Value): void
}

/** One of a few; the browser's own list, which every phone and reader knows. */
export function Choice<Value extends string>({ label, value, options, onChange }: ChoiceProps<Value>) {
  return (
    <label className="choice">
      <span className="label" part="label">
        {label}
      </span>
      <select value={value} onChange={({ currentTarget }) => onChange(currentTarget.value as Value)}>
        {Object.entries<string>(options).map(([each, words]) => (
          <option key={each} value={each}>
            {words}
          </option>
        ))}
      </select>
    </label>
  )
}
