/**
 * The input is well formed but lies outside what nature or the method allows.
 *
 * `field` is the wire name of the input that has to change (`ph`, `pump.max_head_m`), `detail` says what the limit
 * is and how to mend it. The API answers it as a 422 problem with a pointer to the field.
 */
export class OutOfDomain extends Error {
  readonly code = "out_of_domain"

  constructor(
    readonly field: string,
    readonly detail: string,
  ) {
    super(`${field}: ${detail}`)
    this.name = "OutOfDomain"
  }
}

/**
 * Runs a function whose inputs have other names here, and reports its {@link OutOfDomain} under the name that the
 * person used: `withFields({ ph: "tank_ph" }, …)`.
 */
export function withFields<T>(names: Readonly<Record<string, string>>, run: () => T): T {
  try {
    return run()
  } catch (error) {
    const name = error instanceof OutOfDomain ? names[error.field] : undefined
    if (name === undefined) throw error
    throw new OutOfDomain(name, (error as OutOfDomain).detail)
  }
}
