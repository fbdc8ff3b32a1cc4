import fc from "fast-check"
import { resolved, type Schema } from "./document"

// @source PLATFORM 6.9: valid, at the boundary, ×10^-9 and ×10^9, of a wrong type, with a member too many, huge, odd
const odd = fc.constantFrom<unknown>(
  null,
  true,
  "",
  " ",
  "=1+1",
  "<script>alert(1)</script>",
  "' or 1=1 --",
  "\u0000",
  "\ud800",
  "𝒯ank ‮drawkcab",
  "x".repeat(5_000),
  -0,
  1e-320,
  1e308,
  -1,
  2 ** 53,
  [],
  {},
  [[[[[[]]]]]],
  { __proto__: null, constructor: { prototype: 1 } },
)

/** What a schema allows, mostly; now and then something that it does not. */
export function fuzzed(schema: Schema): fc.Arbitrary<unknown> {
  return fc.oneof({ weight: 14, arbitrary: allowed(schema) }, { weight: 1, arbitrary: odd })
}

/** An input that works, with none or a few of its members drawn anew. */
export function varied(works: object, given: Schema): fc.Arbitrary<object> {
  const { properties = {} } = resolved(given)
  const names = Object.keys(properties)
  if (names.length === 0) return fc.constant(works)
  const change = fc
    .constantFrom(...names)
    .chain((name) => fuzzed(properties[name] ?? {}).map((value) => [name, value] as const))
  return fc.array(change, { maxLength: 3 }).map((changes) => ({ ...works, ...Object.fromEntries(changes) }))
}

function allowed(given: Schema): fc.Arbitrary<unknown> {
  const schema = resolved(given)
  const choices = schema.anyOf ?? schema.oneOf
  if (choices) return fc.oneof(...choices.map(fuzzed))
  if (schema.allOf) return fc.tuple(...schema.allOf.map(fuzzed)).map((parts) => Object.assign({}, ...parts))
  if (schema.const !== undefined) return fc.constant(schema.const)
  if (schema.enum) return fc.constantFrom(...schema.enum)
  switch (schema.type) {
    case "number":
    case "integer":
      return numbers(schema)
    case "boolean":
      return fc.boolean()
    case "string":
      return fc.string({ minLength: schema.minLength ?? 0, maxLength: Math.min(schema.maxLength ?? 40, 200) })
    case "array":
      return fc.array(schema.items ? fuzzed(schema.items) : odd, {
        minLength: Math.min(schema.minItems ?? 0, 12),
        maxLength: Math.min(schema.maxItems ?? 12, 12),
      })
    case "object":
      return objects(schema)
    default:
      return odd
  }
}

function numbers({ type, minimum = -1e6, maximum = 1e6 }: Schema): fc.Arbitrary<number> {
  const inside =
    type === "integer"
      ? fc.integer({ min: Math.ceil(minimum), max: Math.floor(Math.min(maximum, 2 ** 31 - 1)) })
      : fc.double({ min: minimum, max: maximum, noNaN: true })
  return fc.oneof(
    { weight: 10, arbitrary: inside },
    { weight: 2, arbitrary: fc.constantFrom(minimum, maximum) },
    { weight: 1, arbitrary: inside.map((value) => value * 1e9) },
    { weight: 1, arbitrary: inside.map((value) => value * 1e-9) },
  )
}

function objects({ properties = {}, required = [] }: Schema): fc.Arbitrary<object> {
  const members = Object.fromEntries(
    Object.entries(properties).map(([name, schema]) => [name, fuzzed(schema)] as const),
  )
  const whole = fc.record(members, { requiredKeys: [...required] as never[] })
  const extra = fc.record({ no_such_field: odd })
  const missing = fc.record(members, { requiredKeys: [] })
  return fc.oneof(
    { weight: 14, arbitrary: whole },
    { weight: 1, arbitrary: fc.tuple(whole, extra).map(([one, other]) => ({ ...one, ...other })) },
    { weight: 1, arbitrary: missing },
  )
}
