import type { SourceId } from "@/lib/chemistry/sources"
import { OutOfDomain } from "@/lib/units/out-of-domain"

/** What a loop is made of besides hose and filter media. */
export type ElementKind = keyof typeof elementTable

/** One row of the loop's parts list, as on the wire. */
export interface ElementInput {
  readonly kind: ElementKind
  /** Measured loss coefficient; replaces the table's. Referred to `inner_diameter_mm`, else to the hose. */
  readonly k?: number
  /** Bore of the element itself where it is not the hose's. */
  readonly inner_diameter_mm?: number
  /** True if it sits in the `return_hose`, where the loop has one. */
  readonly in_return?: boolean
  /** How many of them stand in the loop, 1 if not given. */
  readonly count?: number
  /** Spray bar only: its holes. */
  readonly hole_count?: number
  readonly hole_diameter_mm?: number
}

/** What is known about one kind of element: a row of the table of losses. */
export interface ElementRow {
  readonly label: string
  /** Loss coefficient K in h = K v²/2g, and the range that parts on the market span. */
  readonly k: number
  readonly low: number
  readonly high: number
  /**
   * Where v is taken: `own` in the element's bore if it has one, else in the hose; `hose` always in the hose;
   * `narrower` in the narrower of element and hose.
   */
  readonly bore: "own" | "hose" | "narrower"
  readonly source: SourceId
  /** The coefficient from the geometry, undefined when the geometry is not known. */
  readonly fromGeometry?: (element: ElementInput, hose_mm: number) => number | undefined
}

/** Holes of a spray bar that was not measured. */
const DEFAULT_SPRAY_BAR = { hole_count: 20, hole_diameter_mm: 3 }

/** Discharge coefficient of a drilled hole. @source idelchik2007, sharp-edged orifice */
const ORIFICE_DISCHARGE = 0.62

/** Every kind of element, once: its K, the bore that K is referred to, the range and where it comes from. */
export const elementTable = {
  intake_strainer: row("Intake strainer and pipe", 2, 1.5, 4, "own", "engineeringJudgement"),
  intake_pipe: row("Plain intake pipe reaching into the water", 0.78, 0.78, 0.78, "own", "craneTp410"),
  intake_flush: row("Sharp-edged intake flush with a wall", 0.5, 0.5, 0.5, "own", "craneTp410"),
  intake_rounded: row("Rounded intake", 0.04, 0.04, 0.15, "own", "craneTp410"),
  barb: row("Hose barb", 0.8, 0.41, 2.14, "hose", "craneTp410", fromRatio(barbLoss)),
  expansion: row("Sudden widening", 1, 1, 1, "narrower", "white2011", fromRatio(expansionLoss)),
  contraction: row("Sudden narrowing", 0.5, 0.42, 0.5, "narrower", "craneTp410", fromRatio(contractionLoss)),
  elbow: row("90° elbow", 0.8, 0.6, 1.2, "own", "craneTp410"),
  bend: row("Gentle 90° bend of the hose", 0.3, 0.2, 0.5, "own", "craneTp410"),
  quick_release: row("Pair of quick-release taps", 3, 2, 6, "own", "engineeringJudgement"),
  lily_outflow: row("Flared outflow with its bends", 1.5, 1, 2.5, "own", "engineeringJudgement"),
  spray_bar: row("Spray bar", 5.3, 3, 12, "hose", "idelchik2007", sprayBarLoss),
  exit: row("Plain exit into the tank", 1, 1, 1, "own", "craneTp410"),
  heater: row("Inline heater", 2, 1, 4, "own", "engineeringJudgement"),
  uv: row("UV unit", 3, 2, 6, "own", "engineeringJudgement"),
  inline_diffuser: row("Inline diffuser", 2, 1, 4, "own", "engineeringJudgement"),
  // On a bypass a reactor costs the main loop next to nothing: leave it out, or give the verdict its bypass_fraction.
  reactor: row("Reactor, empty tube", 4, 2.5, 6, "own", "engineeringJudgement"),
  reactor_with_internals: row("Reactor with internals", 8, 5, 15, "own", "engineeringJudgement"),
  other: row("Other element", 1, 1, 1, "own", "engineeringJudgement"),
} satisfies Record<string, ElementRow>

export const elementKinds = Object.keys(elementTable) as [ElementKind, ...ElementKind[]]

/** An element made ready for a loop: its coefficient and the bore that it is referred to. */
export interface Loss {
  readonly k: number
  readonly low: number
  readonly high: number
  readonly bore_mm: number
}

/**
 * The loss coefficient of one row of the parts list (already times its count), with its range.
 *
 * A given `k` has no range; a known geometry gives its own value; otherwise the table's typical value stands.
 * `index` is the row's place in the list, for the error. Throws {@link OutOfDomain} when the bores contradict each
 * other or when an element of kind `other` comes without its `k`.
 */
export function lossOf(element: ElementInput, hose_mm: number, index: number): Loss {
  const known: ElementRow = elementTable[element.kind]
  const count = element.count ?? 1
  const own_mm = element.inner_diameter_mm ?? hose_mm
  if (element.k !== undefined) {
    const k = element.k * count
    return { k, low: k, high: k, bore_mm: own_mm }
  }
  if (element.kind === "other") {
    throw new OutOfDomain(`elements.${index}.k`, "An element of kind other needs its loss coefficient k.")
  }
  if (element.kind === "barb" && own_mm > hose_mm) {
    throw new OutOfDomain(
      `elements.${index}.inner_diameter_mm`,
      `A barb sits inside the hose, so its bore cannot be ${own_mm} mm in a hose of ${hose_mm} mm. Measure the bore of the barb itself.`,
    )
  }
  const bore_mm =
    known.bore === "own" ? own_mm : known.bore === "narrower" ? Math.min(own_mm, hose_mm) : hose_mm
  const fromGeometry = known.fromGeometry?.(element, hose_mm)
  if (fromGeometry === undefined) {
    return { k: count * known.k, low: count * known.low, high: count * known.high, bore_mm }
  }
  const k = count * fromGeometry
  const guessed = element.kind === "spray_bar" && !holesGiven(element)
  return {
    k,
    low: guessed ? (k * known.low) / known.k : k,
    high: guessed ? (k * known.high) / known.k : k,
    bore_mm,
  }
}

/** Borda-Carnot loss of a sudden widening, referred to the narrower bore. @source white2011, eq. 6.101; exact */
export function expansionLoss(boreRatio: number): number {
  return (1 - boreRatio ** 2) ** 2
}

/** Loss of a sudden narrowing, referred to the narrower bore. @source craneTp410; White has 0.42 for 0.5 */
export function contractionLoss(boreRatio: number): number {
  return 0.5 * (1 - boreRatio ** 2)
}

/** Loss of a barb referred to the hose: narrowing into the barb, widening out of it. @source craneTp410, white2011 */
export function barbLoss(boreRatio: number): number {
  return (contractionLoss(boreRatio) + expansionLoss(boreRatio)) / boreRatio ** 4
}

/** Head that drives the water through the holes, referred to the hose. @source idelchik2007, orifice */
function sprayBarLoss(element: ElementInput, hose_mm: number): number {
  const holes = element.hole_count ?? DEFAULT_SPRAY_BAR.hole_count
  const hole_mm = element.hole_diameter_mm ?? DEFAULT_SPRAY_BAR.hole_diameter_mm
  return (hose_mm ** 2 / (ORIFICE_DISCHARGE * holes * hole_mm ** 2)) ** 2
}

/** Narrower over wider of the element's bore and the hose's; undefined when the element's bore is not known. */
function boreRatio(element: ElementInput, hose_mm: number): number | undefined {
  const other_mm = element.inner_diameter_mm
  if (other_mm === undefined) return undefined
  return Math.min(other_mm, hose_mm) / Math.max(other_mm, hose_mm)
}

function holesGiven({ hole_count, hole_diameter_mm }: ElementInput): boolean {
  return hole_count !== undefined || hole_diameter_mm !== undefined
}

function fromRatio(lossAt: (boreRatio: number) => number): ElementRow["fromGeometry"] {
  return (element, hose_mm) => {
    const ratio = boreRatio(element, hose_mm)
    return ratio === undefined ? undefined : lossAt(ratio)
  }
}

function row(
  label: string,
  k: number,
  low: number,
  high: number,
  bore: ElementRow["bore"],
  source: SourceId,
  fromGeometry?: ElementRow["fromGeometry"],
): ElementRow {
  return { label, k, low, high, bore, source, fromGeometry }
}
