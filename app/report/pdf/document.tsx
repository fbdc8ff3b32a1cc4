import { Document, Page, Svg, Text, View } from "@react-pdf/renderer"
import { Fragment } from "react"
import { plainReading } from "@/app/ui/schematic/value-text"
import { WideSchematic, wideBox } from "@/app/ui/schematic/wide"
import type { Caution } from "@/lib/chemistry/answer"
import type { Schematic } from "@/lib/plan/schematic"
import { type Line, reportKinds, type SharedReport, type SheetList, sheetOf } from "@/lib/reports"
import { disclaimer } from "../words"
import { fromSvg } from "./from-svg"
import { look } from "./look"

export type PrintedReport = Pick<
  SharedReport,
  "kind" | "title" | "answer" | "engine_version" | "created_at" | "account_name"
>

/** A report on A4, to be handed over. */
export function ReportDocument({ report }: { report: PrintedReport }) {
  const { kind, title, answer, engine_version, created_at, account_name } = report
  const sheet = sheetOf(report)
  const date = created_at.toLocaleDateString("en", { dateStyle: "long", timeZone: "UTC" })
  return (
    <Document
      title={title}
      author={account_name}
      subject={reportKinds[kind]}
      creator="Tarnwright"
      language="en"
    >
      <Page size="A4" style={look.page}>
        <View style={look.body}>
          <View style={look.head}>
            <Text style={look.shop}>{account_name}</Text>
            <Text style={look.shop}>{date}</Text>
          </View>
          <Text style={look.title}>{title}</Text>
          <Text style={look.about}>
            {title === reportKinds[kind] ? answer.method.name : reportKinds[kind]}
          </Text>
          <Lines title="The answer" lines={sheet.answer} />
          <Cautions cautions={answer.cautions.filter(isDanger) as Caution[]} />
          <Lines title="Worked out from" lines={sheet.given} />
          {sheet.parts.map(({ title, lines, cautions }) => (
            <Fragment key={title}>
              <Lines title={title} lines={lines} />
              <Cautions cautions={cautions.filter((caution) => !isDanger(caution))} />
            </Fragment>
          ))}
          <Cautions
            title="To know beside it"
            cautions={sheet.cautions.filter((caution) => !isDanger(caution))}
          />
          {sheet.lists.map((list) => (
            <List key={list.title} list={list} />
          ))}
          <Heading>Taken for granted, and sources</Heading>
          {answer.assumptions.map(({ code, message }) => (
            <Text key={code} style={look.small}>
              {message}
            </Text>
          ))}
          <Text style={[look.small, { marginTop: 6 }]}>
            {answer.method.sources.map(({ title, year }) => `${title} (${year})`).join("; ")}.
          </Text>
          <Text style={[look.small, { marginTop: 8 }]}>{disclaimer}</Text>
        </View>
        <Foot engine_version={engine_version} />
      </Page>
      {sheet.schematic && (
        <Page size="A4" orientation="landscape" style={look.page}>
          <Drawing schematic={sheet.schematic} />
          <Foot engine_version={engine_version} />
        </Page>
      )}
    </Document>
  )
}

function Foot({ engine_version }: { engine_version: string }) {
  return (
    <View style={look.foot} fixed>
      <Text>Tarnwright engine {engine_version}</Text>
      <Text render={({ pageNumber, totalPages }) => `${pageNumber} of ${totalPages}`} />
    </View>
  )
}

function isDanger({ severity }: { severity: string }): boolean {
  return severity === "danger"
}

// Headings and rows are siblings all the way: the library splits pages well only between siblings.

function Lines({ title, lines }: { title: string; lines: readonly Line[] }) {
  return (
    <>
      <Heading>{title}</Heading>
      {lines.map((line) => (
        <Row key={line.name} line={line} />
      ))}
    </>
  )
}

function Heading({ children }: { children: string }) {
  return (
    <Text style={look.heading} minPresenceAhead={60}>
      {children}
    </Text>
  )
}

function Row({ line: { name, metric, us } }: { line: Line }) {
  return (
    <View style={look.line} wrap={false}>
      <Text style={look.name}>{name}</Text>
      <Text style={look.metric}>{metric}</Text>
      <Text style={look.us}>{us ?? ""}</Text>
    </View>
  )
}

const words = { danger: "Danger. ", warning: "Caution. ", info: "" }

function Cautions({ title, cautions }: { title?: string; cautions: readonly Caution[] }) {
  if (cautions.length === 0) return null
  return (
    <>
      {title && <Heading>{title}</Heading>}
      {cautions.map(({ code, severity, message }) => (
        <View key={code} style={[look.caution, severity === "info" ? {} : look[severity]]} wrap={false}>
          <Text>
            <Text style={look.word}>{words[severity]}</Text>
            {message}
          </Text>
        </View>
      ))}
    </>
  )
}

function Drawing({ schematic }: { schematic: Schematic }) {
  return (
    <View wrap={false} style={look.body}>
      <Text style={look.heading}>The system</Text>
      <Svg viewBox={wideBox} style={look.drawing}>
        {fromSvg(<WideSchematic schematic={schematic} reading={plainReading} />)}
      </Svg>
    </View>
  )
}

function List({ list: { title, items } }: { list: SheetList }) {
  return (
    <>
      <Heading>{title}</Heading>
      {items.map(({ lead, text }, index) => (
        <View key={`${lead} ${text}`} style={look.item} wrap={false}>
          <Text style={lead && lead.length > 4 ? look.lead : look.number}>{lead ?? index + 1}</Text>
          <Text style={look.told}>{text}</Text>
        </View>
      ))}
    </>
  )
}
