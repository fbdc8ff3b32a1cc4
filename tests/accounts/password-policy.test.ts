import { describe, expect, it } from "vitest"
import { passwordProblem } from "@/lib/accounts/password-policy"

const about = { email: "odile@quillback.test", name: "Odile Ferrant" }

describe("a password", () => {
  it.each([
    "tarn moss valve lantern",
    "fünfzehn Zeichen reichen",
    "5hE!pq8zRw-Lk2$vN",
    "correct-horse staple 9",
    "aquarium under the stairs",
  ])("may be “%s”", (password) => {
    expect(passwordProblem(password, about)).toBeUndefined()
  })

  it.each([
    ["fourteen chars", /15 characters/],
    ["x".repeat(201), /at most 200/],
    ["aaaaaaaaaaaaaaaa", /repeats/],
    ["abcabcabcabcabcabc", /repeats/],
    ["mossmossmossmoss", /repeats/],
    ["abcdefghijklmnop", /alphabet/],
    ["qwertyuiopasdfgh", /keyboard/],
    ["1234567890 zyxwvut", /keyboard/],
    ["odile@quillback.test", /your own name/],
    ["tarnwright-password-1", /your own name/],
  ])("may not be “%s”", (password, why) => {
    expect(passwordProblem(password, about)).toMatch(why)
  })

  it("is counted in characters and not in bytes", () => {
    expect(passwordProblem("🐟🌿💧🫧🪨🐠🦐🐌", about)).toMatch(/15 characters/)
  })
})
