import createClient from "openapi-fetch"
import type { paths } from "./schema.generated"

/**
 * A typed client of the API.
 *
 * @example
 * const tarnwright = createTarnwrightClient({ origin: "https://tarnwright.example", key: process.env.TARNWRIGHT_KEY })
 * const { data, error } = await tarnwright.POST("/carbonate/co2", { body: { ph: 6.8, kh_dkh: 4 } })
 */
export function createTarnwrightClient({ origin, key }: { origin: string; key: string }) {
  return createClient<paths>({ baseUrl: `${origin}/api/v1`, headers: { authorization: `Bearer ${key}` } })
}
