import { type FieldError, TarnwrightError } from "@/lib/errors"
import { isAllowedOrigin } from "@/lib/keys"

/** Most pages of a retailer that one widget may stand on. */
const maxOrigins = 20

/**
 * Refuses a name that is empty or longer than 80 characters, and a list of origins that is empty, too long or holds
 * something that is no origin.
 *
 * @throws TarnwrightError `validation_failed`
 */
export function refuseUnfit({ name, origins }: { name: string; origins: readonly string[] }): void {
  const errors: FieldError[] = []
  if (name.trim() === "" || name.length > 80) {
    errors.push({ pointer: "/name", detail: "Give the widget a name of 1 to 80 characters." })
  }
  if (origins.length === 0 || origins.length > maxOrigins) {
    const detail = `Name from 1 to ${maxOrigins} origins on which the widget may stand, as https://shop.example.`
    errors.push({ pointer: "/origins", detail })
  }
  for (const [index, origin] of origins.entries()) {
    if (isAllowedOrigin(origin)) continue
    const detail = "Write an origin as https://shop.example or https://*.shop.example."
    errors.push({ pointer: `/origins/${index}`, detail })
  }
  if (errors.length > 0) {
    throw new TarnwrightError("validation_failed", "The widget's name or origins are not valid.", { errors })
  }
}
