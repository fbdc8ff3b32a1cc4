import { type FormEvent, type ReactNode, useEffect, useId, useRef, useState } from "react"
import type { Asking } from "./ask"
import type { AskMessages } from "./messages/ask-messages"
import { type Consent, newKey, readConsent, sendQuestion } from "./service"
import { emptyValues, type FieldName, fieldNames, type Problems, problemsOf, type Values } from "./state"

interface FormProps {
  readonly asking: Asking
  readonly messages: AskMessages
  readonly firstConsent: Consent
}

/** Asks the shop: name, address, question and consent. Errors stand at their field; nothing is lost on failure. */
export function AskForm({ asking, messages, firstConsent }: FormProps) {
  const id = useId()
  const form = useRef<HTMLFormElement>(null)
  const done = useRef<HTMLParagraphElement>(null)
  const once = useRef(newKey())
  const [consent, setConsent] = useState(firstConsent)
  const [values, setValues] = useState<Values>(emptyValues)
  const [problems, setProblems] = useState<Problems>({})
  const [state, setState] = useState<"writing" | "sending" | "sent" | "failed">("writing")
  const { shop_name, wording } = consent

  // What is typed mends the field at once; what is wrong elsewhere stays said.
  function change(field: FieldName, part: Partial<Values>): void {
    once.current = newKey()
    setValues({ ...values, ...part })
    setProblems(({ [field]: _, ...others }) => others)
  }

  async function submit(event: FormEvent): Promise<void> {
    event.preventDefault()
    if (state === "sending") return
    const found = problemsOf(values)
    if (Object.keys(found).length > 0) return refuse(found)
    setState("sending")
    const outcome = await sendQuestion(asking, values, consent, once.current)
    if (outcome === "sent" || outcome === "failed") return setState(outcome)
    if (outcome.consent === "new_words") {
      setValues({ ...values, agreed: false })
      setConsent(await readConsent(asking).catch(() => consent))
    }
    refuse(outcome)
  }

  function refuse(found: Problems): void {
    setState("writing")
    setProblems(found)
    const first = fieldNames.find((name) => found[name])
    form.current?.querySelector<HTMLElement>(`[name="${first}"]`)?.focus()
  }

  useEffect(() => {
    if (state === "sent") done.current?.focus()
  }, [state])

  if (state === "sent") {
    return (
      <p className="sent" ref={done} tabIndex={-1} role="status">
        {messages.sent(shop_name, values.email.trim())}
      </p>
    )
  }

  /** Attributes that tie a control to what is wrong with it. */
  function tied(name: FieldName) {
    return {
      id: id + name,
      name,
      "aria-invalid": problems[name] !== undefined,
      "aria-describedby": problems[name] && `${id + name}problem`,
    }
  }

  function field(name: "name" | "email" | "message", label: ReactNode, control: ReactNode) {
    return (
      <div className="answer" part="field">
        <label className="label" part="label" htmlFor={id + name}>
          {label}
        </label>
        {control}
        {problem(name)}
      </div>
    )
  }

  function problem(name: FieldName) {
    const found = problems[name]
    return (
      found && (
        <p className="problem" part="problem" id={`${id + name}problem`}>
          {messages.problems[found]}
        </p>
      )
    )
  }

  return (
    <form className="form" ref={form} noValidate onSubmit={submit} aria-labelledby={`${id}title`}>
      <h3 className="form-title" id={`${id}title`}>
        {messages.title(shop_name)}
      </h3>
      <p className="aside">{messages.lead}</p>
      {field(
        "name",
        <>
          {messages.name} <span className="soft">({messages.optional})</span>
        </>,
        <input
          {...tied("name")}
          className="text"
          type="text"
          autoComplete="name"
          value={values.name}
          onInput={({ currentTarget }) => change("name", { name: currentTarget.value })}
        />,
      )}
      {field(
        "email",
        messages.email,
        <input
          {...tied("email")}
          className="text"
          type="email"
          inputMode="email"
          autoComplete="email"
          required
          value={values.email}
          onInput={({ currentTarget }) => change("email", { email: currentTarget.value })}
        />,
      )}
      {field(
        "message",
        messages.message,
        <textarea
          {...tied("message")}
          className="text"
          rows={4}
          required
          value={values.message}
          onInput={({ currentTarget }) => change("message", { message: currentTarget.value })}
        />,
      )}
      <div>
        <label className="agree">
          <input
            {...tied("consent")}
            type="checkbox"
            required
            checked={values.agreed}
            onChange={({ currentTarget }) => change("consent", { agreed: currentTarget.checked })}
          />
          <span>{wording}</span>
        </label>
        {problem("consent")}
        <p className="privacy">
          <a className="link" part="link" href={asking.privacyUrl} target="_blank" rel="noopener">
            {messages.privacy(shop_name)} <span className="soft">({messages.newTab})</span>
          </a>
        </p>
      </div>
      {state === "failed" && (
        <p className="problem" role="alert">
          {messages.failed}
        </p>
      )}
      <div>
        <button className="button" part="button" type="submit" aria-disabled={state === "sending"}>
          {state === "sending" ? messages.sending : messages.send}
        </button>
      </div>
    </form>
  )
}
