/** The database cannot be reached, or ended the connection: what failed may be tried again. */
export class DatabaseUnavailable extends Error {
  readonly code = "unavailable"

  constructor(cause: unknown) {
    super("The database cannot be reached", { cause })
    this.name = "DatabaseUnavailable"
  }
}

// Classes 08 (connection) and 57P0x (shutdown) of PostgreSQL's error codes; 53300 is "too many connections".
const connectionStates = /^(08...|57P0[123]|53300)$/
const socketErrors = new Set(["ECONNREFUSED", "ECONNRESET", "EPIPE", "ETIMEDOUT"])
const poolMessages =
  /timeout exceeded when trying to connect|Connection terminated|Client has encountered a connection/

/** Runs `work`; a failure of the connection comes out as {@link DatabaseUnavailable}, any other as it was. */
export async function orUnavailable<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work()
  } catch (error) {
    throw isConnectionFailure(error) ? new DatabaseUnavailable(error) : error
  }
}

function isConnectionFailure(error: unknown): boolean {
  if (!(error instanceof Error)) return false
  const code = "code" in error ? String(error.code) : ""
  return connectionStates.test(code) || socketErrors.has(code) || poolMessages.test(error.message)
}
