import { describe, expect, it } from "vitest"
import { errorWords } from "@/app/(site)/docs/errors/words"
import { problemPath, problems } from "@/lib/api/problem"

describe("the page of an error", () => {
  it.each(Object.keys(problems) as (keyof typeof problems)[])(
    "%s says what happened and how to mend it",
    (code) => {
      const { why, mend } = errorWords[code]
      expect(why).toMatch(/^[A-Z].{20,}\.$/)
      expect(mend).toMatch(/^[A-Z].{15,}\.$/)
      expect(problemPath(code)).toBe(`/docs/errors/${code}`)
    },
  )
})
