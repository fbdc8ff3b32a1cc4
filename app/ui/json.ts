/** A value as it comes out of JSON: dates are RFC 3339 text. */
export type Json<Value> = Value extends Date
  ? string
  : Value extends readonly (infer Item)[]
    ? Json<Item>[]
    : Value extends object
      ? { [Name in keyof Value]: Json<Value[Name]> }
      : Value

/** What a page hands to the browser at first is what its route hands over later. */
export function asJson<Value>(value: Value): Json<Value> {
  return JSON.parse(JSON.stringify(value))
}
