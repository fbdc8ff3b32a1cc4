import type { ReactNode } from "react"
import type { Column } from "@/app/ui/data-table"
import { EditableCell } from "./editable-cell"
import { attributeLabel, attributeUnit, type KindInfo, type Part } from "./kind-info"
import { priceText, type Read, readAttribute, readName, readPrice, readSku, readUrl } from "./part-values"

type Change = (part: Part, body: object) => Promise<unknown>

/** The columns of the table; without a way to change a part its values are only shown. */
export function columnsFor(kinds: readonly KindInfo[], change?: Change): readonly Column<Part>[] {
  const kindOf = (part: Part) => kinds.find(({ name }) => name === part.kind)!
  const cell = <Value,>(
    part: Part,
    label: string,
    text: string,
    read: (text: string) => Read<Value>,
    body: (value: Value) => object,
    { unit = "", numeric = false } = {},
  ): ReactNode =>
    change ? (
      <EditableCell
        label={`${label} of ${part.name}`}
        {...{ text, unit, numeric, read }}
        save={(value) => change(part, body(value))}
      />
    ) : text ? (
      `${text}${unit && ` ${unit}`}`
    ) : (
      <span className="text-soft">—</span>
    )
  return [
    {
      id: "name",
      header: "Name",
      value: ({ name }) => name,
      cell: (part) => (
        <span className="font-medium">{cell(part, "Name", part.name, readName, (name) => ({ name }))}</span>
      ),
    },
    { id: "kind", header: "Kind", value: (part) => kindOf(part).label },
    {
      id: "sku",
      header: "SKU",
      value: ({ sku }) => sku,
      cell: (part) => (
        <span className="font-mono text-[0.8125rem] whitespace-nowrap">
          {cell(part, "SKU", part.sku ?? "", readSku, (sku) => ({ sku }))}
        </span>
      ),
    },
    {
      id: "price",
      header: "Price",
      value: ({ price }) => (price ? price.amount_minor / 100 : null),
      numeric: true,
      cell: (part) =>
        cell(
          part,
          "Price",
          priceText(part.price),
          (text) => readPrice(text, part.price?.currency),
          (price) => ({ price }),
          { numeric: true },
        ),
    },
    {
      id: "numbers",
      header: "What it can do",
      value: (part) => numbersText(part, kindOf(part)),
      cell: (part) => <Numbers part={part} kind={kindOf(part)} cell={cell} />,
    },
    {
      id: "url",
      header: "Link",
      value: ({ url }) => url,
      cell: (part) => (
        <span className="block max-w-48 break-all">
          {cell(part, "Link", part.url ?? "", readUrl, (url) => ({ url }))}
        </span>
      ),
    },
  ]
}

function numbersText({ attributes }: Part, { attributes: infos }: KindInfo): string {
  const said = infos.flatMap((info) => {
    const value = attributes[info.name]
    return value === undefined ? [] : [`${attributeLabel(info.name)} ${value} ${attributeUnit(info)}`.trim()]
  })
  const { method, pump_curve } = attributes
  if (Array.isArray(pump_curve)) said.push(`curve of ${pump_curve.length} points`)
  if (method) said.push(method === "diffuser" ? "in the tank" : "in the hose")
  return said.join("; ")
}

function Numbers({
  part,
  kind,
  cell,
}: {
  part: Part
  kind: KindInfo
  cell: (
    part: Part,
    label: string,
    text: string,
    read: (text: string) => Read<number | undefined>,
    body: (value: number | undefined) => object,
    look: { unit: string; numeric: boolean },
  ) => ReactNode
}) {
  const { attributes } = part
  const curve = attributes.pump_curve
  // What most parts of a kind leave out is in the form of the part, not in every row of the table.
  const infos = kind.attributes.filter(({ name, required }) => required || attributes[name] !== undefined)
  return (
    <div className="min-w-0">
      {Array.isArray(curve) && <p className="text-soft">Pump curve of {curve.length} points</p>}
      {attributes.method && (
        <p className="text-soft">{attributes.method === "diffuser" ? "In the tank" : "In the hose"}</p>
      )}
      {infos.length > 0 && (
        <dl className="space-y-0.5">
          {infos.map((info) => (
            <div key={info.name} className="flex flex-wrap items-baseline gap-x-2">
              <dt className="text-soft">{attributeLabel(info.name)}</dt>
              <dd className="font-mono text-[0.8125rem]">
                {cell(
                  part,
                  attributeLabel(info.name),
                  String(attributes[info.name] ?? ""),
                  (text) => readAttribute(text, info),
                  (value) => ({ attributes: { ...attributes, [info.name]: value } }),
                  { unit: attributeUnit(info), numeric: true },
                )}
              </dd>
            </div>
          ))}
        </dl>
      )}
    </div>
  )
}
