import { describe, expect, it } from "vitest"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { messages as de } from "@/widgets/co2-level/messages/de"
import { messages as en } from "@/widgets/co2-level/messages/en"
import { messages as es } from "@/widgets/co2-level/messages/es"
import { messages as ja } from "@/widgets/co2-level/messages/ja"
import {
  type Event,
  impossibleField,
  khTests,
  nextState,
  phMeters,
  type State,
  startState,
} from "@/widgets/co2-level/state"
import { cautionWords, setPointWords, wordsOf } from "@/widgets/co2-level/words"
import { chooseLocale, numberWriter } from "@/widgets/shared/locale"
import { isCurrent } from "@/widgets/shared/sheet"

const english = chooseLocale(["en"])
const write = numberWriter(english)
const speech = { locale: english, messages: en }
const catalogues = { en, de, es, ja }

function start(settings = {}): State {
  return startState({ settings }, write)
}

function told(events: Event[], from = start()): State {
  return events.reduce((state, event) => nextState(state, event, write), from)
}

const ph = (text: string): Event => ({ type: "typed", field: "ph", text })
const kh = (text: string): Event => ({ type: "typed", field: "kh_dkh", text })

describe("the calculator CO2 level", () => {
  // CHEMISTRY 4: pH 6.8, 4 dKH, 25 °C with the ionic strength from KH alone is 21.0487 mg/L.
  it("says what the worked example of the method says", () => {
    const { result } = told([ph("6.8"), kh("4")]).answer
    expect(result.co2_mg_l).toBeCloseTo(21.0487, 3)
  })

  // CHEMISTRY 6: sodium bicarbonate water of 4 dKH and 25 °C holds 30 mg/L at pH 6.654. The water here is taken to
  // hold 1 mmol/L of other salts, which lowers CO2 by up to 4 % (MODEL_SIGMA), so the set-point by up to 0.018.
  it("sets the controller where 30 mg/L is", () => {
    const { setPoint } = told([kh("4")]).answer
    expect(setPoint?.ph).toBeGreaterThan(6.654 - 0.018)
    expect(setPoint?.ph).toBeLessThan(6.654)
  })

  it("answers exactly as the API does", () => {
    const { answer: reading } = told([
      ph("7.13"),
      kh("2.5"),
      { type: "slid", field: "temperature_c", shown: 23.5 },
    ])
    const { result } = co2FromPh({ ...carbonateDefaults, ph: 7.13, kh_dkh: 2.5, temperature_c: 23.5 })
    expect(reading.result).toEqual(result)
  })

  it("answers for the same water whatever the unit", () => {
    const metric = told([kh("4")])
    const ppm = told([{ type: "unit_chosen", field: "kh_dkh", unit: "kh_ppm_caco3" }], metric)
    const both = told([{ type: "unit_chosen", field: "temperature_c", unit: "f" }], ppm)
    expect(both.fields.kh_dkh.text).toBe("71")
    expect(both.fields.temperature_c.text).toBe("77")
    expect(both.answer.result).toEqual(metric.answer.result)
  })

  it("is surer with a better meter and a finer test", () => {
    const width = ({ answer: { result } }: State) => result.co2_high_mg_l / result.co2_low_mg_l
    const better = told([{ type: "chosen", choices: { phMeter: "bench" } }])
    const finer = told([{ type: "chosen", choices: { khTest: "fine" } }], better)
    expect(width(better)).toBeLessThan(width(start()))
    expect(width(finer)).toBeLessThan(width(better))
    expect(finer.answer.result.co2_mg_l).toBe(start().answer.result.co2_mg_l)
  })
})

describe("what cannot be worked out", () => {
  it.each(["", "x", "3", "12", "6.8.1"])(
    "pH %j leaves the last answer and says that it is the last",
    (text) => {
      const good = told([ph("7"), kh("6")])
      const state = told([ph(text)], good)
      expect(state.answer).toBe(good.answer)
      expect(isCurrent(good)).toBe(true)
      expect(isCurrent(state)).toBe(false)
      expect(isCurrent(told([ph("7")], state))).toBe(true)
    },
  )

  it("names the field where pH and KH cannot be so together", () => {
    const acid = told([kh("30"), ph("4")])
    expect(impossibleField(acid)).toBe("ph")
    const bare = told([{ type: "typed", field: "temperature_c", text: "45" }, ph("9.5"), kh("0.1")])
    expect(impossibleField(bare)).toBe("kh_dkh")
    for (const state of [acid, bare]) {
      expect(isCurrent(state)).toBe(false)
      expect(state.answer.result.co2_mg_l).toBeGreaterThan(0)
    }
  })

  it("works nothing out while it is paused, and all of it afterwards", () => {
    const paused = told([{ type: "paused", isPaused: true }, ph("6.4")])
    expect(paused.answer).toEqual(start().answer)
    expect(isCurrent(paused)).toBe(false)
    const again = told([{ type: "paused", isPaused: false }], paused)
    expect(again.asked.values.ph).toBe(6.4)
    expect(isCurrent(again)).toBe(true)
  })

  it("gives a usual tank where a widget's start cannot be", () => {
    expect(start({ start: { ph: 4, kh_dkh: 30 } }).asked.values).toEqual(start().asked.values)
    expect(start({ start: { ph: 7.2 } }).asked.values.ph).toBe(7.2)
  })
})

describe("the words of the answer", () => {
  it("carry two significant digits, units and the level by the upper end", () => {
    const state = told([ph("6.8"), kh("4")])
    const words = wordsOf(state, speech)
    expect(words).toMatchObject({ co2: "21", ph: "6.8", kh: "4 dKH", temperature: "25 °C" })
    expect(en.sentence(words)).toBe(
      `At pH 6.8, 4 dKH and 25 °C the water holds about 21 mg/L CO2, and with 95\u00a0% certainty between ` +
        `${words.low} and ${words.high} mg/L. Judged by the upper end, that is ${en.levels[state.answer.result.level]}.`,
    )
  })

  it("name the water that the answer is of, not what stands in the fields since", () => {
    const state = told([ph("7"), ph("7.x")])
    expect(wordsOf(state, speech).ph).toBe("7")
  })

  it("give only an upper bound where KH may as well be none", () => {
    const state = told([kh("0.6")])
    const words = wordsOf(state, speech)
    expect(words.low).toBeNull()
    expect(en.interval(words)).toBe(`at most ${words.high} mg/L`)
    expect(en.sentence(words)).toContain(`and ${words.high} mg/L at most`)
  })

  it("write numbers as the shopper's locale does", () => {
    const german = chooseLocale(["de"])
    const state = startState({ settings: {} }, numberWriter(german))
    const spoken = { locale: german, messages: de }
    expect(wordsOf(state, spoken).ph).toBe("6,8")
    expect(setPointWords(state.answer, spoken)?.advice).toMatch(/pH 6,6\d stellen/)
  })

  it("say in every language every caution that the engine can give here", () => {
    const seen = new Map<string, State>()
    for (const meter of Object.keys(phMeters) as (keyof typeof phMeters)[]) {
      for (const test of Object.keys(khTests) as (keyof typeof khTests)[]) {
        const measured = told([
          { type: "chosen", choices: { phMeter: meter } },
          { type: "chosen", choices: { khTest: test } },
        ])
        for (let acidity = 4; acidity <= 9.5; acidity += 0.25) {
          for (const hardness of [0.1, 0.4, 1, 2, 4, 8, 16, 30]) {
            for (const warmth of [2, 25, 45]) {
              const state = told(
                [
                  ph(String(acidity)),
                  kh(String(hardness)),
                  { type: "typed", field: "temperature_c", text: `${warmth}` },
                ],
                measured,
              )
              for (const { code, severity } of state.answer.cautions) {
                seen.set(`${code} ${severity} ${Math.ceil(state.answer.result.co2_high_mg_l / 10)}`, state)
              }
            }
          }
        }
      }
    }
    expect(seen.size).toBeGreaterThan(20)
    for (const [language, messages] of Object.entries(catalogues)) {
      const spoken = { locale: chooseLocale([language]), messages }
      for (const state of seen.values()) {
        const words = wordsOf(state, spoken)
        for (const caution of state.answer.cautions) {
          const text = cautionWords(caution, state.answer, words, spoken)
          expect(text, `${caution.code} in ${language}`).toBeTruthy()
        }
      }
    }
  })

  it("do not soften what the engine says of the livestock", () => {
    const said = (text: string) => {
      const state = told([ph(text)])
      const caution = state.answer.cautions.find(({ code }) => code === "livestock")!
      return cautionWords(caution, state.answer, wordsOf(state, speech), speech)
    }
    expect(said("7.2")).toContain("usually bear")
    expect(said("6.8")).toContain("above the 30 mg/L")
    expect(said("6.65")).toContain("suffer")
    expect(said("6.3")).toContain("can kill")
  })

  it("put the gravest caution first", () => {
    const severities = told([ph("6.2")]).answer.cautions.map(({ severity }) => severity)
    expect(severities[0]).toBe("danger")
    expect(severities).toEqual([...severities].sort((a, b) => order.indexOf(a) - order.indexOf(b)))
  })
})

const order = ["danger", "warning", "info"]

describe("the catalogues", () => {
  it("say the same things in each language", () => {
    for (const messages of [de, es, ja]) {
      expect(shapeOf(messages)).toEqual(shapeOf(en))
    }
  })

  it("leave nothing in English", () => {
    for (const messages of [de, es, ja]) {
      const same = leavesOf(messages).filter(([path, text]) => new Map(leavesOf(en)).get(path) === text)
      expect(same).toEqual([])
    }
  })
})

function shapeOf(value: object): string[] {
  return Object.entries(value).flatMap(([name, member]) =>
    typeof member === "object"
      ? shapeOf(member).map((path) => `${name}.${path}`)
      : [`${name}: ${typeof member}`],
  )
}

function leavesOf(value: object, prefix = ""): [string, string][] {
  return Object.entries(value).flatMap(([name, member]): [string, string][] => {
    if (typeof member === "object") return leavesOf(member, `${prefix}${name}.`)
    return [
      [`${prefix}${name}`, typeof member === "string" ? member : member.toString().replace(/\s+/g, " ")],
    ]
  })
}
