import { z } from "zod"
import { runDue } from "../billing/due"
import { isLive } from "../billing/status"
import { invalid } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { newId } from "../core/ids"
import { page as pageOf } from "../core/lists"
import { clearable, count, page } from "../core/params"
import { route } from "../core/route"
import type { Objects } from "../core/state"

const DAY_S = 86_400
const INTERVAL_S = { day: DAY_S, week: 7 * DAY_S, month: 31 * DAY_S, year: 366 * DAY_S } as Record<
  string,
  number
>

export const testClocks = [
  route(
    "POST",
    "/v1/test_helpers/test_clocks",
    z.strictObject({ frozen_time: count, name: clearable.optional() }),
    ({ fake, params }) =>
      fake.put("test_helpers.test_clock", {
        id: newId("clock"),
        object: "test_helpers.test_clock",
        created: Math.floor(Date.now() / 1000),
        deletes_after: Math.floor(Date.now() / 1000) + 30 * DAY_S,
        frozen_time: params.frozen_time,
        livemode: false,
        name: params.name ?? null,
        status: "ready",
        status_details: {},
      }),
  ),
  route("GET", "/v1/test_helpers/test_clocks", z.strictObject(page), ({ fake, params }) =>
    pageOf(fake.all("test_helpers.test_clock"), params, "/v1/test_helpers/test_clocks"),
  ),
  route("GET", "/v1/test_helpers/test_clocks/:id", z.strictObject({}), ({ fake, path }) =>
    fake.get("test_helpers.test_clock", path.id!),
  ),
  route(
    "POST",
    "/v1/test_helpers/test_clocks/:id/advance",
    z.strictObject({ frozen_time: count }),
    ({ fake, params, path }) => {
      const clock = fake.get("test_helpers.test_clock", path.id!)
      const target = params.frozen_time
      if (target <= clock.frozen_time)
        throw invalid("A clock can only be advanced to a later time.", "frozen_time")
      if (target - clock.frozen_time > 2 * shortestInterval(fake, clock.id)) {
        throw invalid("Cannot advance more than two intervals of the shortest subscription.", "frozen_time")
      }
      clock.status = "advancing"
      clock.status_details = { advancing: { target_frozen_time: target } }
      setImmediate(() => finish(fake, clock, target))
      return clock
    },
  ),
]

/** The answer says "advancing", as in the real service; the work is done a moment later. */
function finish(fake: Fake, clock: Objects["test_helpers.test_clock"], target: number): void {
  runDue(fake, clock, target)
  clock.frozen_time = target
  clock.status = "ready"
  clock.status_details = {}
  fake.changed()
  fake.emit("test_helpers.test_clock.ready", clock)
}

function shortestInterval(fake: Fake, clock: string): number {
  const intervals = fake
    .all("subscription")
    .filter((one) => isLive(one) && fake.state.objects.customer[idOf(one.customer)!]?.test_clock === clock)
    .map((one) => one.items.data[0]!.price.recurring!)
    .map((recurring) => (INTERVAL_S[recurring.interval] ?? DAY_S) * recurring.interval_count)
  return Math.min(366 * DAY_S, ...intervals)
}
