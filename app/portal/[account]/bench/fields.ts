import type { QuantityName } from "@/lib/units/quantities"

/** One line of the Bench's form that is typed: what it is called, where it goes in a plan's input, what it starts with. */
export interface Field {
  readonly label: string
  /** Path in the input of a plan. */
  readonly path: string
  readonly quantity?: QuantityName
  /** A time of day, a whole number of pieces, points of a curve; otherwise a quantity. */
  readonly kind?: "clock" | "count" | "curve"
  readonly start: string
  readonly optional?: true
  readonly step?: number
}

const needed = (
  quantity: QuantityName,
  label: string,
  start: string,
  step: number,
  path: string = quantity,
): Field => ({
  label,
  path,
  quantity,
  start,
  step,
})
const optional = (
  quantity: QuantityName,
  label: string,
  step: number,
  path: string = quantity,
  start = "",
): Field => ({ label, path, quantity, start, step, optional: true })
const count = (label: string, start: string): Field => ({ label, path: "elements", kind: "count", start })

/** Every typed field. What it starts with is what the trade meets most: a tank of 90 cm, 16 mm hose, 2 kg of CO2. */
export const fields = {
  length_cm: needed("length_cm", "Length", "90", 5),
  width_cm: needed("width_cm", "Width", "45", 5),
  height_cm: needed("height_cm", "Water height", "45", 5),
  volume_l: needed("volume_l", "Volume to the water line", "180", 10),
  surface_area_m2: optional("surface_area_m2", "Open surface", 0.05),
  substrate_depth_cm: optional("substrate_depth_cm", "Soil or gravel", 1, "substrate_depth_cm", "5"),
  hardscape_l: optional("hardscape_l", "Stone and wood", 1, "hardscape_l", "5"),
  start_ph: optional("start_ph", "pH at lights out", 0.05, "overnight.start_ph"),
  end_ph: optional("end_ph", "pH later that night", 0.05, "overnight.end_ph"),
  elapsed_h: optional("elapsed_h", "Hours between", 1, "overnight.elapsed_h"),
  kh_dkh: needed("kh_dkh", "Carbonate hardness, KH", "4", 0.5),
  temperature_c: needed("temperature_c", "Temperature", "25", 0.5),
  ph: optional("ph", "pH now", 0.05),
  gh_dgh: optional("gh_dgh", "Total hardness, GH", 1),
  conductivity_us_cm: optional("conductivity_us_cm", "Conductivity", 10),
  tds_mg_l: optional("tds_mg_l", "TDS", 10),
  phosphate_mg_l: optional("phosphate_mg_l", "Phosphate, PO4", 0.5),
  doc_mg_l: optional("doc_mg_l", "Organic carbon", 1),
  rest_co2_mg_l: optional("rest_co2_mg_l", "CO2 without gas", 0.5),
  altitude_m: optional("altitude_m", "Above the sea", 100),
  target_co2_mg_l: needed("target_co2_mg_l", "CO2 to hold", "30", 1),
  photoperiod_h: needed("photoperiod_h", "Light a day", "8", 0.5),
  lights_on_h: {
    label: "Lights on at",
    path: "lights_on_h",
    quantity: "lights_on_h",
    kind: "clock",
    start: "10:00",
  },
  close_before_lights_off_min: needed("close_before_lights_off_min", "Gas off before dark", "60", 5),
  wished_lead_min: optional("wished_lead_min", "Lead wished for", 5),
  max_flow_l_h: needed("max_flow_l_h", "Flow on the box", "1200", 50, "pump.max_flow_l_h"),
  max_head_m: needed("max_head_m", "Head on the box", "1.8", 0.1, "pump.max_head_m"),
  pump_points: { label: "Points of its curve", path: "pump.points", kind: "curve", start: "" },
  hose_diameter_mm: needed("inner_diameter_mm", "Hose bore", "16", 1, "hose.inner_diameter_mm"),
  hose_length_m: needed("length_m", "Hose, both ways", "3", 0.5, "hose.length_m"),
  return_diameter_mm: optional("inner_diameter_mm", "Return bore", 1, "return_hose.inner_diameter_mm"),
  return_length_m: optional("length_m", "Return length", 0.5, "return_hose.length_m"),
  lift_m: optional("lift_m", "Outflow above water", 0.05, "lift_m", "0"),
  barb: count("Hose barbs", "4"),
  quick_release: count("Tap pairs", "1"),
  bend: count("Gentle bends", "4"),
  elbow: count("Elbows", "0"),
  heater: count("Inline heaters", "0"),
  uv: count("UV units", "0"),
  hole_count: { label: "Holes", path: "elements.0.hole_count", kind: "count", start: "20" },
  hole_diameter_mm: needed("hole_diameter_mm", "Hole bore", "3", 0.5, "elements.0.hole_diameter_mm"),
  body_diameter_mm: optional("body_diameter_mm", "Body bore", 5, "equipment.reactor.body_diameter_mm"),
  body_length_mm: optional("body_length_mm", "Free length", 10, "equipment.reactor.body_length_mm"),
  nozzle_diameter_mm: optional(
    "nozzle_diameter_mm",
    "Inlet bore",
    0.5,
    "equipment.reactor.nozzle_diameter_mm",
  ),
  reactor_k: optional("k", "Loss coefficient K", 0.5, "equipment.reactor.k"),
  bypass_fraction: optional("bypass_fraction", "Share on a bypass", 0.1, "equipment.reactor.bypass_fraction"),
  cylinder_mass_g: needed("cylinder_mass_g", "CO2 when full", "2000", 100, "cylinders.0.cylinder_mass_g"),
  remaining_g: optional("remaining_g", "CO2 left in it", 50, "cylinders.0.remaining_g"),
  fill_ratio_kg_l: optional("fill_ratio_kg_l", "Fill ratio", 0.01, "cylinders.0.fill_ratio_kg_l"),
  test_pressure_bar: optional("test_pressure_bar", "Test pressure", 10, "cylinders.0.test_pressure_bar"),
  price: optional("price", "Price, full", 1, "cylinders.0.price"),
  refill_price: optional("refill_price", "Price of a refill", 1, "cylinders.0.refill_price"),
  ambient_c: needed("ambient_c", "Where it stands", "22", 1),
  depth_m: needed("depth_m", "Gas outlet, depth", "0.4", 0.05),
  check_valve_bar: needed("check_valve_bar", "Check valve opens", "0.15", 0.05),
  line_length_m: needed("line_length_m", "Gas line", "2", 0.5),
  line_diameter_mm: needed("line_diameter_mm", "Its bore", "2.5", 0.5),
  room_length_m: needed("room_length_m", "Room length", "4", 0.5),
  room_width_m: needed("room_width_m", "Room width", "4", 0.5),
  room_height_m: needed("room_height_m", "Room height", "2.5", 0.1),
} as const satisfies Record<string, Field>

export type FieldName = keyof typeof fields
export const fieldNames = Object.keys(fields) as FieldName[]

export function fieldOf(name: FieldName): Field {
  return fields[name]
}

interface Choice {
  readonly label: string
  readonly start: string
  readonly options: Readonly<Record<string, string>>
}

/** Every field that is chosen from a few; the keys of the options are what stands in the form. */
export const choices = {
  tank_by: { label: "Tank by", start: "size", options: { size: "Length, width, height", volume: "Volume" } },
  agitation: {
    label: "Surface",
    start: "rippled",
    options: { calm: "Calm", rippled: "Rippled", agitated: "Agitated", strong: "Strongly agitated" },
  },
  ph_error: {
    label: "pH is read with",
    start: "0.1",
    options: { "0.02": "Bench meter, ±0.02", "0.1": "Pen or probe, ±0.1", "0.2": "Liquid test, ±0.2" },
  },
  kh_error_dkh: {
    label: "KH is tested in",
    start: "0.5",
    options: { "0.25": "Steps of 0.5 dKH", "0.5": "Steps of 1 dKH" },
  },
  plant_demand: {
    label: "Plants",
    start: "usual",
    options: { sparse: "Few, slow", usual: "Usual", dense: "Dense, strong light" },
  },
  method: {
    label: "Gas goes in by",
    start: "",
    options: {
      "": "What suits the tank",
      inline_reactor: "Inline reactor",
      inline_diffuser: "Inline diffuser",
      diffuser: "Diffuser in the tank",
    },
  },
  control: {
    label: "Valve is switched by",
    start: "",
    options: { "": "What suits the feed", controller: "pH controller", timer: "Timer" },
  },
  pump_by: { label: "Filter by", start: "box", options: { box: "Numbers on the box", curve: "Its curve" } },
  clean_media_fraction: {
    label: "Box was measured",
    start: "0.8",
    options: { "0.8": "Without media, as most", "1": "With media" },
  },
  corrugation_factor: { label: "Hose wall", start: "1", options: { "1": "Smooth", "2.5": "Ribbed" } },
  intake: {
    label: "Intake",
    start: "intake_strainer",
    options: { intake_strainer: "Strainer", intake_pipe: "Plain pipe", intake_rounded: "Rounded" },
  },
  outflow: {
    label: "Outflow",
    start: "lily_outflow",
    options: { lily_outflow: "Flared pipe", spray_bar: "Spray bar", exit: "Plain end" },
  },
  clogging: {
    label: "Filter media now",
    start: "0",
    options: { "0": "Clean", "0.3": "Loaded", "0.7": "Due for cleaning", "1": "Blocked" },
  },
  air_changes_per_h: {
    label: "Air in the room",
    start: "0.5",
    options: { "0.2": "Tight, doors shut", "0.5": "Usual", "2": "Window open" },
  },
} as const satisfies Record<string, Choice>

export type ChoiceName = keyof typeof choices
export const choiceNames = Object.keys(choices) as ChoiceName[]

/** What stands in the form: a text for each field, an option for each choice. */
export type BenchForm = Record<FieldName | ChoiceName, string>

/** The form before a customer has said anything. */
export const startForm = Object.fromEntries([
  ...fieldNames.map((name) => [name, fields[name].start]),
  ...choiceNames.map((name) => [name, choices[name].start]),
]) as BenchForm

/** What a tank is met with where it is measured in inches, in the engine's units: 36 by 18 by 18 in, 5 lb of CO2. */
export const usStart: Readonly<Partial<Record<FieldName, number>>> = {
  length_cm: 91.44,
  width_cm: 45.72,
  height_cm: 45.72,
  substrate_depth_cm: 5.08,
  hardscape_l: 3.785411784,
  max_flow_l_h: 1211.33177,
  max_head_m: 1.8288,
  hose_diameter_mm: 15.875,
  hose_length_m: 3.048,
  cylinder_mass_g: 2267.96185,
  ambient_c: 22.222222222222,
  depth_m: 0.381,
  line_length_m: 1.8288,
  line_diameter_mm: 2.54,
  room_length_m: 3.9624,
  room_width_m: 3.9624,
  room_height_m: 2.4384,
}

/** Fields that count with what is chosen; the others keep their text and are left out. */
export function activeFields(form: BenchForm): FieldName[] {
  const out = new Set<FieldName>()
  const leave = (...names: FieldName[]) => {
    for (const name of names) out.add(name)
  }
  if (form.tank_by === "size") leave("volume_l", "surface_area_m2")
  else leave("length_cm", "width_cm", "height_cm")
  if (form.pump_by === "box") leave("pump_points")
  else leave("max_flow_l_h", "max_head_m")
  if (form.outflow !== "spray_bar") leave("hole_count", "hole_diameter_mm")
  return fieldNames.filter((name) => !out.has(name))
}
