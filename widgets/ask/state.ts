/** What a shopper fills in. */
export interface Values {
  readonly name: string
  readonly email: string
  readonly message: string
  readonly agreed: boolean
}

export const emptyValues: Values = { name: "", email: "", message: "", agreed: false }

/** In the order in which they stand. */
export const fieldNames = ["name", "email", "message", "consent"] as const
export type FieldName = (typeof fieldNames)[number]

/** Why a field cannot be sent; the catalogue has a sentence for each. */
export type Problem = "name" | "email_empty" | "email" | "message_empty" | "message" | "consent" | "new_words"

export type Problems = Readonly<Partial<Record<FieldName, Problem>>>

/** The service's own bounds, so that nothing is sent to be refused. */
export const longest = { name: 100, email: 254, message: 4_000 } as const

/** What keeps this from being sent. */
export function problemsOf({ name, email, message, agreed }: Values): Problems {
  return {
    ...(name.trim().length > longest.name && { name: "name" as const }),
    ...emailProblem(email.trim()),
    ...(message.trim() === "" && { message: "message_empty" as const }),
    ...(message.trim().length > longest.message && { message: "message" as const }),
    ...(!agreed && { consent: "consent" as const }),
  }
}

/** What the service found, by its pointers; undefined where it concerns nothing that the shopper can mend. */
export function problemsIn(errors: readonly { readonly pointer: string }[]): Problems | undefined {
  const problems: Partial<Record<FieldName, Problem>> = {}
  for (const { pointer } of errors) {
    const [, field, part] = pointer.split("/")
    if (field === "consent") problems.consent = part === "version" ? "new_words" : "consent"
    else if (field === "name" || field === "email" || field === "message") problems[field] = field
    else return undefined
  }
  return Object.keys(problems).length > 0 ? problems : undefined
}

function emailProblem(email: string): Problems {
  if (email === "") return { email: "email_empty" }
  return email.length <= longest.email && /^[^\s@]+@[^\s@]+\.[^\s@]{2,}$/.test(email)
    ? {}
    : { email: "email" }
}
