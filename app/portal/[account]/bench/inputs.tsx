"use client"

import { memo, type ReactNode } from "react"
import { useWatch } from "react-hook-form"
import { DownMark } from "@/app/ui/marks"
import { useBench } from "./bench-context"
import { ChoiceInput, FieldInput } from "./field-inputs"

/** Everything that is asked, in the order of a talk at the counter. */
export const Inputs = memo(function Inputs({ allOpen }: { allOpen: boolean }) {
  return (
    <>
      <Tank />
      <Water />
      <PlantsAndLight isOpen={allOpen} />
      <FilterAndLine isOpen={allOpen} />
      <GasSide isOpen={allOpen} />
    </>
  )
})

function Tank() {
  const { form } = useBench()
  const by = useWatch({ control: form.control, name: "tank_by" })
  return (
    <Group title="Tank" isOpen>
      <ChoiceInput name="tank_by" wide />
      {by === "size" ? (
        <>
          <FieldInput name="length_cm" />
          <FieldInput name="width_cm" />
          <FieldInput name="height_cm" />
        </>
      ) : (
        <>
          <FieldInput name="volume_l" wide />
          <FieldInput name="surface_area_m2" />
        </>
      )}
      <FieldInput name="substrate_depth_cm" />
      <FieldInput name="hardscape_l" />
      <ChoiceInput name="agitation" />
      <More title="Surface measured overnight">
        <p className="col-span-2 text-sm text-soft">
          Two pH readings of one night, gas and light off, replace the guess of the surface.
        </p>
        <FieldInput name="start_ph" />
        <FieldInput name="end_ph" />
        <FieldInput name="elapsed_h" />
      </More>
    </Group>
  )
}

function Water() {
  return (
    <Group title="Water" isOpen>
      <FieldInput name="kh_dkh" wide />
      <FieldInput name="temperature_c" />
      <FieldInput name="ph" />
      <More title="Other readings, test kit, place">
        <ChoiceInput name="kh_error_dkh" wide />
        <ChoiceInput name="ph_error" wide />
        <FieldInput name="gh_dgh" wide />
        <FieldInput name="conductivity_us_cm" />
        <FieldInput name="tds_mg_l" />
        <FieldInput name="phosphate_mg_l" />
        <FieldInput name="doc_mg_l" />
        <FieldInput name="rest_co2_mg_l" />
        <FieldInput name="altitude_m" />
      </More>
    </Group>
  )
}

function PlantsAndLight({ isOpen }: { isOpen: boolean }) {
  return (
    <Group title="Plants and light" isOpen={isOpen}>
      <ChoiceInput name="plant_demand" wide />
      <FieldInput name="target_co2_mg_l" />
      <FieldInput name="photoperiod_h" />
      <FieldInput name="lights_on_h" />
      <FieldInput name="close_before_lights_off_min" />
      <ChoiceInput name="method" wide />
      <More title="Valve and lead">
        <ChoiceInput name="control" wide />
        <FieldInput name="wished_lead_min" />
      </More>
    </Group>
  )
}

function FilterAndLine({ isOpen }: { isOpen: boolean }) {
  const { form } = useBench()
  const by = useWatch({ control: form.control, name: "pump_by" })
  const outflow = useWatch({ control: form.control, name: "outflow" })
  return (
    <Group title="Filter and return line" isOpen={isOpen}>
      <ChoiceInput name="pump_by" wide />
      {by === "box" ? (
        <>
          <FieldInput name="max_flow_l_h" />
          <FieldInput name="max_head_m" />
        </>
      ) : (
        <FieldInput name="pump_points" wide />
      )}
      <FieldInput name="hose_diameter_mm" />
      <FieldInput name="hose_length_m" />
      <ChoiceInput name="clogging" wide />
      <More title="Fittings and hose">
        <ChoiceInput name="intake" />
        <ChoiceInput name="outflow" />
        {outflow === "spray_bar" && (
          <>
            <FieldInput name="hole_count" />
            <FieldInput name="hole_diameter_mm" />
          </>
        )}
        <FieldInput name="barb" />
        <FieldInput name="quick_release" />
        <FieldInput name="bend" />
        <FieldInput name="elbow" />
        <FieldInput name="heater" />
        <FieldInput name="uv" />
        <FieldInput name="lift_m" />
        <ChoiceInput name="corrugation_factor" />
        <FieldInput name="return_diameter_mm" />
        <FieldInput name="return_length_m" />
        <ChoiceInput name="clean_media_fraction" wide />
      </More>
      <More title="A reactor that is owned">
        <p className="col-span-2 text-sm text-soft">Empty: the smallest that would serve is worked out.</p>
        <FieldInput name="body_diameter_mm" />
        <FieldInput name="body_length_mm" />
        <FieldInput name="nozzle_diameter_mm" />
        <FieldInput name="reactor_k" />
        <FieldInput name="bypass_fraction" />
      </More>
    </Group>
  )
}

function GasSide({ isOpen }: { isOpen: boolean }) {
  return (
    <Group title="Cylinder and room" isOpen={isOpen}>
      <FieldInput name="cylinder_mass_g" />
      <FieldInput name="remaining_g" />
      <FieldInput name="refill_price" />
      <FieldInput name="price" />
      <FieldInput name="room_length_m" />
      <FieldInput name="room_width_m" />
      <FieldInput name="room_height_m" />
      <ChoiceInput name="air_changes_per_h" />
      <More title="Gas line and stamps">
        <FieldInput name="depth_m" />
        <FieldInput name="check_valve_bar" />
        <FieldInput name="line_length_m" />
        <FieldInput name="line_diameter_mm" />
        <FieldInput name="ambient_c" />
        <FieldInput name="fill_ratio_kg_l" />
        <FieldInput name="test_pressure_bar" />
      </More>
    </Group>
  )
}

function Group({ title, isOpen, children }: { title: string; isOpen: boolean; children: ReactNode }) {
  return (
    <details open={isOpen} className="group border-t border-line py-4">
      <summary className="flex list-none items-center justify-between [&::-webkit-details-marker]:hidden">
        <h2 className="text-lg">{title}</h2>
        <DownMark className="size-4 text-soft group-open:rotate-180" />
      </summary>
      <div className="mt-4 grid grid-cols-2 gap-x-3 gap-y-3.5">{children}</div>
    </details>
  )
}

function More({ title, children }: { title: string; children: ReactNode }) {
  return (
    <details className="col-span-2">
      <summary className="link text-sm">{title}</summary>
      <div className="mt-3 grid grid-cols-2 gap-x-3 gap-y-3.5">{children}</div>
    </details>
  )
}
