import { strFromU8, unzipSync } from "fflate"
import { describe, expect, it } from "vitest"
import { archiveOf } from "@/lib/exports/archive"

const rows = [
  { id: "rep_1", title: '=HYPERLINK("x")', tags: ["a", "b"], more: { ph: 6.6 }, at: new Date(0), none: null },
]
const files = unzipSync(
  archiveOf([{ name: "reports", columns: ["id", "title", "tags", "more", "at", "none"], rows }], "About it"),
)

describe("an archive", () => {
  it("is a zip that says what it is and holds each list as JSON and as CSV", () => {
    expect(Object.keys(files).sort()).toEqual(["README.txt", "csv/reports.csv", "json/reports.json"])
    expect(strFromU8(files["README.txt"]!)).toBe("About it")
    expect(JSON.parse(strFromU8(files["json/reports.json"]!))).toEqual(JSON.parse(JSON.stringify(rows)))
  })

  it("writes lists, objects, times and formulas so that a spreadsheet shows them and runs nothing", () => {
    expect(strFromU8(files["csv/reports.csv"]!)).toBe(
      'id,title,tags,more,at,none\r\nrep_1,"\'=HYPERLINK(""x"")",a b,"{""ph"":6.6}",1970-01-01T00:00:00.000Z,\r\n',
    )
  })
})
