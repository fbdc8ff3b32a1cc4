import { Circle, G, Path, Text } from "@react-pdf/renderer"
import { Children, type FunctionComponent, isValidElement, type ReactElement, type ReactNode } from "react"
import { text } from "./fonts"
import { colours } from "./look"

type Props = Record<string, unknown> & { readonly children?: ReactNode }

/** A drawing of the screen, made of plain SVG, in the primitives of the PDF library: drawn once, printed as it is. */
export function fromSvg(node: ReactNode): ReactNode {
  return Children.map(node, (child) => (isValidElement<Props>(child) ? element(child) : null))
}

function element({ type, props, key }: ReactElement<Props>): ReactNode {
  if (typeof type === "function") return fromSvg((type as FunctionComponent<Props>)(props) as ReactNode)
  const { children, ...own } = props
  const shown = withColours(own)
  switch (type) {
    case "path":
      return <Path key={key} {...(shown as { d: string })} />
    case "circle":
      return (
        <Circle key={key} {...(shown as { r: number })} cx={Number(own.cx ?? 0)} cy={Number(own.cy ?? 0)} />
      )
    case "g":
      return (
        <G key={key} {...shown}>
          {fromSvg(children)}
        </G>
      )
    case "text":
      return textLines(own, children)
    default:
      return fromSvg(children)
  }
}

/** A text of several lines, each a `tspan` of its own; the library places no `tspan` by itself. */
function textLines(props: Record<string, unknown>, children: ReactNode): ReactNode {
  let y = Number(props.y)
  return Children.toArray(children).map((child, index) => {
    if (!isValidElement<Props>(child)) return null
    y += Number(child.props.dy ?? 0)
    const isLabel = child.props.fontWeight === 600
    return (
      <Text
        // biome-ignore lint/suspicious/noArrayIndexKey: the lines of a drawing never change places
        key={index}
        x={Number(props.x)}
        y={y}
        textAnchor={props.textAnchor as "start" | "end"}
        fill={colours.ink}
        style={{
          fontFamily: text,
          fontWeight: isLabel ? 600 : 400,
          fontSize: isLabel ? 13 : 12,
        }}
      >
        {wordsOf(child.props.children)}
      </Text>
    )
  })
}

function wordsOf(node: ReactNode): string {
  return Children.toArray(node)
    .map((child) => (isValidElement<Props>(child) ? wordsOf(child.props.children) : String(child)))
    .join("")
}

const properties: Readonly<Record<string, string>> = {
  "var(--paper)": colours.paper,
  "var(--ink)": colours.ink,
  "var(--soft)": colours.soft,
  "var(--sunk)": colours.sunk,
  "var(--action)": colours.action,
  "var(--level-low)": colours.water,
}

function withColours(props: Record<string, unknown>): Record<string, unknown> {
  return Object.fromEntries(
    Object.entries(props).map(([name, value]) => [name, properties[String(value)] ?? value]),
  )
}
