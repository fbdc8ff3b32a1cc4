import { FieldView } from "./field-view"
import type { Locale } from "./locale"
import type { SharedMessages } from "./messages/shared-messages"
import { askedFor } from "./sheet"
import type { InUse } from "./use-sheet"

interface FieldsProps<Name extends string, Choices extends object, Answer> {
  readonly inUse: InUse<Name, Choices, Answer>
  /** Those that stand here; absent: all that the choices ask for. */
  readonly names?: readonly Name[]
  readonly labels: Readonly<Record<Name, string>>
  readonly locale: Locale
  readonly messages: SharedMessages
  /** The field that the engine wants changed, and why. */
  readonly refusal: { readonly field: string; readonly text: string } | null
}

/** The fields of a calculator, each only while its choices ask for it. */
export function Fields<Name extends string, Choices extends object, Answer>(
  props: FieldsProps<Name, Choices, Answer>,
) {
  const { inUse, names, labels, locale, messages, refusal } = props
  const { kind, sheet, change } = inUse
  return askedFor(kind, sheet.choices)
    .filter((name) => names?.includes(name) ?? true)
    .map((field) => (
      <FieldView
        key={field}
        kind={kind.fields[field]}
        field={sheet.fields[field]}
        label={labels[field]}
        locale={locale}
        messages={messages}
        refusal={refusal?.field === field ? refusal.text : null}
        onType={(text) => change({ type: "typed", field, text })}
        onSlide={(shown) => change({ type: "slid", field, shown })}
        onUnit={(unit) => change({ type: "unit_chosen", field, unit })}
      />
    ))
}
