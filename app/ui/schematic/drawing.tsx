import type { Schematic } from "@/lib/plan/schematic"
import type { Reading } from "@/lib/units/format"
import { NarrowSchematic, narrowLayout } from "./narrow"
import { plainReading, valueLine } from "./value-text"
import { WideSchematic, wideBox } from "./wide"

/**
 * The gas train and the water loop of a plan, each number where it physically belongs. Across where there is room,
 * one under another where there is not; the same values follow as a table.
 */
export function SchematicDrawing({
  schematic,
  reading = plainReading,
}: {
  schematic: Schematic
  reading?: Reading
}) {
  const { height } = narrowLayout(schematic)
  const label = "Schematic of the gas train and the water loop. The table after it holds the same values."
  return (
    <figure className="@container">
      <svg role="img" aria-label={label} viewBox={wideBox} className="hidden w-full @min-[60rem]:block">
        <WideSchematic schematic={schematic} reading={reading} />
      </svg>
      <svg
        role="img"
        aria-label={label}
        viewBox={`0 0 404 ${height}`}
        className="block w-full max-w-md @min-[60rem]:hidden"
      >
        <NarrowSchematic schematic={schematic} reading={reading} />
      </svg>
      <details className="mt-4 print:hidden">
        <summary className="link text-sm">The same values as a table</summary>
        <SchematicTable schematic={schematic} reading={reading} />
      </details>
    </figure>
  )
}

function SchematicTable({
  schematic: { nodes, edges },
  reading,
}: {
  schematic: Schematic
  reading: Reading
}) {
  const labels = new Map(nodes.map(({ id, label }) => [id, label]))
  const rows = [
    ...nodes.map(({ id, label, values }) => ({ id, place: label, values })),
    ...edges
      .filter(({ values }) => values.length > 0)
      .map(({ from, to, values }) => ({
        id: `${from} ${to}`,
        place: `${labels.get(from)} to ${(labels.get(to) ?? to).toLowerCase()}`,
        values,
      })),
  ]
  return (
    <table className="mt-3 w-full max-w-measure text-left text-sm">
      <caption className="sr-only">Values of the schematic</caption>
      <thead>
        <tr className="text-soft">
          <th scope="col" className="py-1.5 pr-6 font-medium">
            Place
          </th>
          <th scope="col" className="py-1.5 font-medium">
            Values
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ id, place, values }) => (
          <tr key={id} className="border-t border-line align-top">
            <th scope="row" className="py-1.5 pr-6 font-normal">
              {place}
            </th>
            <td className="py-1.5">
              {values.map((value) => (
                <span key={`${value.quantity} ${value.of ?? ""}`} className="block">
                  {valueLine(value, reading)}
                </span>
              ))}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
