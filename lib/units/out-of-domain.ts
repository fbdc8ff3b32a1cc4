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
