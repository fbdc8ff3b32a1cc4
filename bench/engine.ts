/** Calls per second of each function of the engine, on one core. Not a test: machines differ. */
import { carbonateSystem, co2AtPh, khAtCo2, phAtCo2 } from "@/lib/chemistry/carbonate"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromDropChecker, dropCheckerDefaults } from "@/lib/chemistry/co2-from-drop-checker"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { co2FromPhDrop, phDropDefaults } from "@/lib/chemistry/co2-from-ph-drop"
import { co2Grid } from "@/lib/chemistry/co2-grid"
import { khFromCo2 } from "@/lib/chemistry/kh-from-co2"
import { phForCo2 } from "@/lib/chemistry/ph-for-co2"
import { cloggingCourse, DEFAULT_STEPS } from "@/lib/flow/clogging-course"
import { flowDefaults } from "@/lib/flow/loop-input"
import { operatingPoint } from "@/lib/flow/operating-point"
import { reactorDefaults } from "@/lib/flow/reactor-input"
import { reactorVerdict } from "@/lib/flow/reactor-verdict"
import { controllerDay } from "@/lib/gas/controller-day"
import { gasDefaults } from "@/lib/gas/defaults"
import { gasDemand } from "@/lib/gas/demand"
import { leadTime } from "@/lib/gas/lead-time"
import { planDefaults } from "@/lib/plan/plan-input"
import { systemPlan } from "@/lib/plan/system-plan"

const tank = { ...gasDefaults, volume_l: 180, surface_area_m2: 0.4 }

interface Row {
  readonly name: string
  /** Calls per second that the product wants; absent where nobody set one. */
  readonly target?: number
  /** Called with 0, 1, 2 …, so that no two calls in a row are the same. Returns something, so that it is not dropped. */
  readonly fn: (i: number) => unknown
}

const water = { temperature_c: 25, ionic_strength_mol_l: 0.003 }
const system = carbonateSystem(water)
const loop = {
  ...flowDefaults,
  pump: { max_flow_l_h: 1000, max_head_m: 1.6 },
  hose: { inner_diameter_mm: 16, length_m: 3 },
  elements: [{ kind: "intake_strainer" }, { kind: "barb", count: 4 }, { kind: "lily_outflow" }],
  volume_l: 180,
} as const
const reactorLoop = {
  ...reactorDefaults,
  ...loop,
  reactor: { body_diameter_mm: 60, body_length_mm: 350 },
  feed_mg_min: 60,
}
const sweep = (i: number, from: number, to: number) => from + ((to - from) * (i % 97)) / 97

const rows: readonly Row[] = [
  {
    name: "carbonate: CO2 from pH, new water each time",
    target: 300_000,
    fn: (i) =>
      co2AtPh(carbonateSystem({ ...water, temperature_c: sweep(i, 18, 30) }), { ph: 6.8, kh_dkh: 4 }),
  },
  {
    name: "carbonate: pH from CO2, new water each time",
    target: 300_000,
    fn: (i) =>
      phAtCo2(carbonateSystem({ ...water, temperature_c: sweep(i, 18, 30) }), { co2_mg_l: 30, kh_dkh: 4 }),
  },
  {
    name: "carbonate: CO2 from pH, same water",
    target: 300_000,
    fn: (i) => co2AtPh(system, { ph: sweep(i, 6, 8), kh_dkh: 4 }),
  },
  {
    name: "carbonate: pH from CO2, same water",
    target: 300_000,
    fn: (i) => phAtCo2(system, { co2_mg_l: sweep(i, 1, 60), kh_dkh: 4 }),
  },
  {
    name: "carbonate: KH from CO2, same water",
    target: 300_000,
    fn: (i) => khAtCo2(system, { co2_mg_l: sweep(i, 1, 60), ph: 6.8 }),
  },
  {
    name: "answer: co2FromPh",
    fn: (i) => co2FromPh({ ...carbonateDefaults, ph: sweep(i, 6, 8), kh_dkh: 4 }),
  },
  {
    name: "answer: phForCo2",
    fn: (i) => phForCo2({ ...carbonateDefaults, co2_mg_l: sweep(i, 5, 60), kh_dkh: 4 }),
  },
  {
    name: "answer: khFromCo2",
    fn: (i) => khFromCo2({ ...carbonateDefaults, co2_mg_l: sweep(i, 5, 60), ph: 6.8 }),
  },
  {
    name: "answer: co2FromPhDrop",
    fn: (i) => co2FromPhDrop({ ...phDropDefaults, tank_ph: sweep(i, 6.4, 7.4), degassed_ph: 8.3 }),
  },
  {
    name: "answer: co2FromDropChecker",
    fn: (i) => co2FromDropChecker({ ...dropCheckerDefaults, indicator_ph: sweep(i, 6, 7.6) }),
  },
  {
    name: "answer: co2Grid of 2,500 cells",
    fn: (i) =>
      co2Grid({
        ...carbonateDefaults,
        temperature_c: sweep(i, 18, 30),
        ph_from: 6,
        ph_to: 7.96,
        ph_step: 0.04,
        kh_from_dkh: 1,
        kh_to_dkh: 19.62,
        kh_step_dkh: 0.38,
      }),
  },
  {
    name: "answer: operatingPoint",
    target: 20_000,
    fn: (i) => operatingPoint({ ...loop, clogging: sweep(i, 0, 1) }),
  },
  {
    name: "answer: reactorVerdict",
    fn: (i) => reactorVerdict({ ...reactorLoop, clogging: sweep(i, 0, 1) }),
  },
  {
    name: "answer: cloggingCourse of 11 steps",
    fn: (i) => cloggingCourse({ ...reactorLoop, feed_mg_min: sweep(i, 20, 90), steps: DEFAULT_STEPS }),
  },
  { name: "answer: gasDemand", fn: (i) => gasDemand({ ...tank, kh_dkh: sweep(i, 2, 8) }) },
  { name: "answer: leadTime", fn: (i) => leadTime({ ...tank, kh_dkh: sweep(i, 2, 8) }) },
  {
    name: "answer: controllerDay, both ends of its interval",
    fn: (i) => controllerDay({ ...tank, kh_dkh: sweep(i, 2, 8) }),
  },
  {
    name: "answer: systemPlan",
    target: 500,
    fn: (i) => systemPlan({ ...planDefaults, ...loop, kh_dkh: sweep(i, 2, 8) }),
  },
]

export function run(): void {
  const width = Math.max(...rows.map((row) => row.name.length))
  for (const { name, target, fn } of rows) {
    const rate = callsPerSecond(fn)
    const verdict = target === undefined ? "" : `  target ${count(target)}${rate < target ? "  BELOW" : ""}`
    console.log(`${name.padEnd(width)}  ${count(rate).padStart(11)}/s${verdict}`)
  }
}

/** The best of five rounds of about 0.2 s of processor time, so that other work on the machine counts little. */
function callsPerSecond(fn: Row["fn"]): number {
  let kept: unknown
  const time = (calls: number) => {
    const start = process.cpuUsage()
    for (let i = 0; i < calls; i++) kept = fn(i)
    const { user, system } = process.cpuUsage(start)
    return (user + system) / 1e6
  }
  let calls = 1
  while (time(calls) < 0.1) calls *= 2
  const best = Math.min(...Array.from({ length: 5 }, () => time(2 * calls)))
  if (kept === undefined) throw new Error("the benchmark returned nothing")
  return (2 * calls) / best
}

function count(value: number): string {
  return Math.round(value).toLocaleString("en")
}
