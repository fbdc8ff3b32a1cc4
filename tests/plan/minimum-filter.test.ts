import { describe, expect, test } from "vitest"
import { flowAt, prepareLoop } from "@/lib/flow/loop-input"
import { DUE_CLOGGING } from "@/lib/flow/media"
import { minimumFilter } from "@/lib/plan/minimum-filter"
import { workedLoop } from "../flow/loops"

const loop = workedLoop(180, 16, 1000, 1.6)
const prepared = prepareLoop(loop)

describe("minimumFilter", () => {
  test.each([
    { clean_flow_l_h: 400, due_flow_l_h: 0 },
    { clean_flow_l_h: 400, due_flow_l_h: 390 },
    { clean_flow_l_h: 800, due_flow_l_h: 371 },
  ])("moves just what is needed: $clean_flow_l_h L/h clean, $due_flow_l_h when due", (need) => {
    const { max_flow_l_h, max_head_m } = minimumFilter(prepared, need)
    const sized = prepareLoop({ ...loop, pump: { max_flow_l_h: max_flow_l_h!, max_head_m: max_head_m! } })
    const clean = flowAt(sized, 0) / need.clean_flow_l_h
    const due = flowAt(sized, DUE_CLOGGING) / need.due_flow_l_h
    expect(Math.min(clean, due)).toBeCloseTo(1, 2)
  })

  test("keeps the shape and the ratio of the present pump, also of a measured curve", () => {
    const points = [1.6, 1.45, 0.9, 0].map((head_m, i) => ({ flow_l_h: i * 333, head_m }))
    const { max_flow_l_h, max_head_m } = minimumFilter(prepareLoop({ ...loop, pump: { points } }), {
      clean_flow_l_h: 300,
      due_flow_l_h: 0,
    })
    expect(max_flow_l_h! / max_head_m!).toBeCloseTo(999 / 1.6, 6)
  })

  test("says whether the present filter is enough", () => {
    const flow = flowAt(prepared, 0)
    const enough = (share: number) =>
      minimumFilter(prepared, { clean_flow_l_h: share * flow, due_flow_l_h: 0 }).present_is_enough
    expect([enough(0.98), enough(1.02)]).toEqual([true, false])
  })

  test("finds none where no canister filter moves the water through so narrow a hose", () => {
    const narrow = prepareLoop({ ...loop, hose: { inner_diameter_mm: 6, length_m: 4 } })
    const need = { clean_flow_l_h: 2000, due_flow_l_h: 0 }
    expect(minimumFilter(narrow, need)).toMatchObject({ max_flow_l_h: null, present_is_enough: false })
  })
})
