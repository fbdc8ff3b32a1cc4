import { shared } from "@/widgets/shared/messages/en"
import type { Co2LevelMessages } from "./co2-level-messages"

export const messages: Co2LevelMessages = {
  shared,
  title: "CO2 level",
  fields: {
    ph: "pH of the tank water",
    kh_dkh: "Carbonate hardness (KH)",
    temperature_c: "Water temperature",
  },
  levels: { low: "low", in_range: "in range", high: "high", dangerous: "dangerous" },
  figureTitle: "CO2 in this water",
  interval: ({ low, high }) => (low === null ? `at most ${high} mg/L` : `between ${low} and ${high} mg/L`),
  sentence: ({ ph, kh, temperature, co2, low, high, level }) =>
    `At pH ${ph}, ${kh} and ${temperature} the water holds about ${co2} mg/L CO2, ` +
    `${low === null ? `and ${high} mg/L at most` : `and with 95\u00a0% certainty between ${low} and ${high} mg/L`}. ` +
    `Judged by the upper end, that is ${level}.`,
  setPoint: ({ target, ph }) => `For ${target} mg/L, set the controller to pH ${ph}.`,
  setPointInterval: ({ low, high }) => `Your meter may then read anything from ${low} to ${high}.`,
  mapTitle: "Where this water lies",
  tableTitle: "The pH for each CO2 level at this KH",
  measuredTitle: "How you measured",
  phMeter: "pH measured with",
  phMeters: { bench: "a bench meter, just calibrated", pen: "a pen or probe", liquid: "a liquid test" },
  khTest: "KH measured with",
  khTests: { fine: "a drop test, 0.5 dKH a drop", coarse: "a drop test, 1 dKH a drop" },
  cautions: {
    livestock_30: ({ high }) =>
      `CO2 may be as high as ${high} mg/L. Healthy fish usually bear that; low oxygen, the night and sensitive species change it.`,
    livestock_40: ({ high }) =>
      `CO2 may be as high as ${high} mg/L, above the 30 mg/L that planted tanks aim at. Measure in a second way before you add gas.`,
    livestock_60: ({ high }) =>
      `CO2 may be as high as ${high} mg/L. Above 40 mg/L many fish and shrimp suffer: give less gas, aerate, and watch for gasping at the surface and fast breathing.`,
    livestock_above: ({ high }) =>
      `CO2 may be as high as ${high} mg/L, which can kill. With animals in the tank stop the gas and aerate until a surer reading shows less.`,
    raise_slowly: () =>
      "Raise CO2 in small steps over several days and watch the animals after each step. If they gasp or lie still, stop the gas and aerate.",
    upper_bound_only: () =>
      "With this test the KH may as well be none, so only the upper bound means something. Titrate a larger sample.",
    no_upper_bound: ({ high }) =>
      `These readings set no upper limit to CO2: ${high} mg/L is as much as pure gas can give the water. Measure pH and KH more exactly.`,
    outside_design_range: () =>
      "This is outside the range of usual tank water (pH 5.8 to 8.4, 0.5 to 20 dKH, 10 to 35 °C). Readings are harder to trust there.",
    acid_or_hydroxide: () => "So far from neutral the result hangs on a very good pH reading.",
    low_kh: ({ kh }) =>
      `At ${kh} one drop of the test is a large part of the reading. Titrate a larger sample, or use a drop checker.`,
    borate: () => "Above pH 8 boron in the water counts as hardness and makes CO2 read too high.",
    ph_is_no_proof: () =>
      "A pH reading proves CO2 only where no other acid or buffer is at work. Peat, driftwood and phosphate make CO2 read too high. Check with a drop checker.",
    common_chart: () =>
      "A printed pH-KH chart shows another value (usually a tenth less): it leaves out temperature and salts.",
    calibrate_probe: () =>
      "A probe that is off by 0.1 changes CO2 by a quarter, by 0.3 it doubles or halves it. Calibrate before you set the controller.",
    below_air: () => "Air alone gives this water more CO2 than the target. Adding gas cannot lower it.",
  },
  impossible: {
    ph: "pH and KH cannot both be so: water would have to hold more CO2 than pure gas can give it. Check the pH meter and the KH test.",
    kh_dkh: "pH and KH cannot both be so: no carbonate would be left. Measure KH again.",
  },
  method:
    "From the carbonate equilibrium at your temperature, corrected for the salts that go with this KH. The interval comes from your own meter and test and holds the true value 95 times in 100; the level is judged by its upper end, so that an uncertain reading never looks safer than it is.",
}
