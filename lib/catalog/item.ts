import type { Selectable } from "kysely"
import type { Schema } from "@/db"
import { type FieldError, TarnwrightError } from "@/lib/errors"
import { checkBounds } from "@/lib/units/bounds"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import { attributesOf, type ItemKind, itemKinds } from "./kinds"

/** One point of a pump's measured curve. */
export interface CurvePoint {
  readonly flow_l_h: number
  readonly head_m: number
}

/** Numbers of an item by their wire name; a filter may have `pump_curve`, a diffuser has `method`. */
export type ItemAttributes = Readonly<Record<string, number | string | readonly CurvePoint[]>>

export interface NewItem {
  readonly kind: ItemKind
  readonly name: string
  readonly sku?: string | null | undefined
  readonly url?: string | null | undefined
  readonly price_minor?: number | null | undefined
  readonly currency?: string | null | undefined
  readonly attributes: ItemAttributes
}

/** An item as the account sees it. */
export interface Item extends Required<NewItem> {
  readonly id: string
  readonly sku: string | null
  readonly url: string | null
  readonly price_minor: number | null
  readonly currency: string | null
  readonly created_at: Date
  readonly updated_at: Date
}

export function itemOf(row: Selectable<Schema["catalog_item"]>): Item {
  const { account_id, kind, attributes, ...rest } = row
  return { ...rest, kind: kind as ItemKind, attributes: attributes as ItemAttributes }
}

const currencyCode = /^[A-Z]{3}$/
const longestName = 160
const mostPoints = 60

/**
 * Everything that is wrong with an item, each with a pointer; empty when it can be kept.
 *
 * A number outside its quantity's bounds, a missing number, a number that its kind does not have, a price without a
 * currency.
 */
export function itemErrors(item: NewItem): FieldError[] {
  const errors: FieldError[] = []
  const say = (pointer: string, detail: string) => errors.push({ pointer, detail })
  if (item.name.trim() === "" || item.name.length > longestName) {
    say("/name", `Give the item a name of at most ${longestName} characters.`)
  }
  if (item.url && !/^https:\/\//.test(item.url)) say("/url", "Send an address that begins with https://.")
  if ((item.price_minor ?? null) === null) {
    if (item.currency) say("/price_minor", "A currency needs a price.")
  } else if (!item.currency || !currencyCode.test(item.currency)) {
    say("/currency", "Send the currency of the price as three letters, as USD.")
  }
  errors.push(...attributeErrors(item))
  return errors
}

/** @throws TarnwrightError `validation_failed` with all that is wrong. */
export function requireFit(item: NewItem): void {
  const errors = itemErrors(item)
  if (errors.length === 0) return
  const [first] = errors
  throw new TarnwrightError(
    "validation_failed",
    errors.length === 1 && first ? first.detail : `${errors.length} things are wrong.`,
    { errors },
  )
}

function attributeErrors({ kind, attributes }: NewItem): FieldError[] {
  const known = attributesOf(kind)
  const extra = kind === "filter" ? ["pump_curve"] : kind === "diffuser" ? ["method"] : []
  const errors: FieldError[] = []
  for (const [name, value] of Object.entries(attributes)) {
    const pointer = `/attributes/${name}`
    const attribute = known.find((each) => each.name === name)
    if (attribute) {
      const detail = numberProblem(value, attribute.quantity)
      if (detail) errors.push({ pointer, detail })
    } else if (!extra.includes(name)) {
      const names = [...known.map((each) => each.name), ...extra].join(", ") || "no numbers"
      errors.push({ pointer, detail: `A ${itemKinds[kind].label.toLowerCase()} has ${names}.` })
    }
  }
  for (const { name, required } of known) {
    if (required && attributes[name] === undefined) {
      errors.push({
        pointer: `/attributes/${name}`,
        detail: "This number is missing: nothing could be matched without it.",
      })
    }
  }
  if (kind === "filter") errors.push(...pumpErrors(attributes))
  if (kind === "diffuser" && attributes.method !== "diffuser" && attributes.method !== "inline_diffuser") {
    errors.push({
      pointer: "/attributes/method",
      detail: 'Send "diffuser" for one in the tank, "inline_diffuser" for one in the hose.',
    })
  }
  return errors
}

function pumpErrors({ max_flow_l_h, max_head_m, pump_curve }: ItemAttributes): FieldError[] {
  if (pump_curve === undefined) {
    if (max_flow_l_h !== undefined && max_head_m !== undefined) return []
    const detail = "A filter needs max_flow_l_h and max_head_m, or pump_curve with at least two points."
    return [{ pointer: "/attributes/pump_curve", detail }]
  }
  if (!isCurve(pump_curve)) {
    const detail = `Send 2 to ${mostPoints} points of flow_l_h and head_m, none below 0.`
    return [{ pointer: "/attributes/pump_curve", detail }]
  }
  return []
}

/** Whether the value is a list of curve points. */
export function isCurve(value: unknown): value is CurvePoint[] {
  return (
    Array.isArray(value) &&
    value.length >= 2 &&
    value.length <= mostPoints &&
    value.every(({ flow_l_h, head_m }) => flow_l_h >= 0 && flow_l_h <= 20_000 && head_m >= 0 && head_m <= 10)
  )
}

function numberProblem(value: unknown, quantity: keyof typeof quantities): string | undefined {
  if (typeof value !== "number") return "Send a number."
  try {
    checkBounds({ [quantity]: value }, quantities)
    return undefined
  } catch (error) {
    if (error instanceof OutOfDomain) return error.detail
    throw error
  }
}
