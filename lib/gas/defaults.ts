import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"

/** The defaults of every gas question, for the API, the widgets and the plan alike. */
export const gasDefaults = {
  temperature_c: carbonateDefaults.temperature_c,
  air_co2_ppm: carbonateDefaults.air_co2_ppm,
  altitude_m: carbonateDefaults.altitude_m,
  ph_error: carbonateDefaults.ph_error,
  target_co2_mg_l: 30,
  agitation: "rippled",
  method: "inline_reactor",
  photoperiod_h: 8,
  plant_uptake_mg_l_h: 1,
  // Common practice, no source: the gas opens 1 to 1.5 h before the lights and closes about 1 h before they go off.
  wished_lead_min: 75,
  close_before_lights_off_min: 60,
  reach_fraction: 0.95,
  /** Brings a rippled tank of 180 L to 95 % of 30 mg/L in about 1.25 h. */
  feed_ratio: 4.5,
  hysteresis_ph: 0.1,
  delay_min: 1,
  probe_lag_min: 1,
  lights_on_h: 10,
  usable_fraction: 0.95,
  ambient_c: 22,
  fill_ratio_kg_l: 0.75,
  test_pressure_bar: 250,
  cut_off_bar_abs: 6,
  outlet_diameter_mm: 2.5,
  counter_pressure_bar: 0,
  depth_m: 0.4,
  check_valve_bar: 0.15,
  line_length_m: 2,
  line_diameter_mm: 2.5,
  air_changes_per_h: 0.5,
  room_c: 20,
  background_ppm: carbonateDefaults.air_co2_ppm,
} as const
