/** Where the API begins; both mounts answer below it. */
export const API_PREFIX = "/api/v1"

/** A call as both mounts hand it over. */
export interface ApiRequest {
  readonly method: string
  /** Below `/api/v1`, decoded by nobody: `/carbonate/co2`. */
  readonly path: string
  readonly query: URLSearchParams
  /** A header by its lower-case name. */
  header(name: string): string | undefined
  /**
   * The body's bytes, read when asked for.
   *
   * @throws TarnwrightError `body_too_large` past `limit` bytes.
   */
  readBody(limit: number): Promise<Uint8Array>
  /** Network address of the caller. */
  readonly address: string
}

/** An answer as both mounts send it. Header names are lower-case. */
export interface ApiResponse {
  readonly status: number
  readonly headers: Readonly<Record<string, string>>
  /** Text, or the bytes of a file. */
  readonly body: string | Uint8Array | null
}
