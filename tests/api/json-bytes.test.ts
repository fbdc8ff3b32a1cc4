import fc from "fast-check"
import { expect, it } from "vitest"
import { jsonOf } from "@/lib/api/json-bytes"

it("the bytes of a long list say what JSON.stringify says of the whole", () => {
  const member = fc.oneof(fc.jsonValue(), fc.constant(undefined), fc.array(fc.jsonValue(), { maxLength: 40 }))
  fc.assert(
    fc.property(
      fc.dictionary(fc.string({ unit: "binary" }), member),
      fc.array(fc.jsonValue()),
      (rest, list) => {
        const output = { ...rest, list: [...list, ...Array.from({ length: 16 }, (_, index) => `×${index}`)] }
        const written = jsonOf(output)
        expect(written).toBeInstanceOf(Uint8Array)
        expect(Buffer.from(written).toString()).toBe(Buffer.from(JSON.stringify(output)).toString())
      },
    ),
  )
})

it("what holds no long list stays text", () => {
  for (const output of [null, 1, "a", [1, 2], { list: [1, 2] }, {}])
    expect(jsonOf(output)).toBe(JSON.stringify(output))
})
