import { describe, expect, it } from "vitest"
import { count } from "@/scripts/test/vitest"

const report = (testResults: { status: string; name: string; assertionResults: { status: string }[] }[]) => {
  const all = testResults.flatMap(({ assertionResults }) => assertionResults)
  const number = (status: string) => all.filter((each) => each.status === status).length
  return {
    numPassedTests: number("passed"),
    numFailedTests: number("failed"),
    numPendingTests: number("pending"),
    numTodoTests: number("todo"),
    testResults,
  }
}

describe("the count on the last line of npm test", () => {
  it("is that of the tests that passed and failed, with the skipped ones apart", () => {
    const statuses = ["passed", "passed", "failed", "pending", "todo"]
    const file = {
      status: "failed",
      name: "a.test.ts",
      assertionResults: statuses.map((status) => ({ status })),
    }
    expect(count(report([file]))).toEqual({ passed: 2, failed: 1, skipped: 2 })
  })

  it("has a failure for a file that could not be read, which has no test to fail", () => {
    const good = { status: "passed", name: "a.test.ts", assertionResults: [{ status: "passed" }] }
    const broken = { status: "failed", name: "b.test.ts", assertionResults: [] }
    expect(count(report([good, broken]))).toEqual({ passed: 1, failed: 1, skipped: 0 })
  })

  it("has a failure for a file whose hook failed after its tests had passed", () => {
    const file = { status: "failed", name: "a.test.ts", assertionResults: [{ status: "passed" }] }
    expect(count(report([file]))).toEqual({ passed: 1, failed: 1, skipped: 0 })
  })
})
