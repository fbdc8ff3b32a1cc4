import type { Co2Level } from "@/lib/chemistry/level"
import type { SharedMessages } from "@/widgets/shared/messages/shared-messages"
import type { FieldName, KhTest, PhMeter } from "../state"

/** Numbers of a reading as the locale writes them, units included where a unit could be another. */
export interface ReadingWords {
  readonly ph: string
  readonly kh: string
  readonly temperature: string
  readonly co2: string
  /** null: only the upper end of the interval means something. */
  readonly low: string | null
  readonly high: string
  readonly level: string
}

/** What the calculator *CO2 level* says. */
export interface Co2LevelMessages {
  readonly shared: SharedMessages
  readonly title: string
  readonly fields: Readonly<Record<FieldName, string>>
  readonly levels: Readonly<Record<Co2Level, string>>
  readonly figureTitle: string
  /** The interval under the figure. */
  readonly interval: (words: ReadingWords) => string
  /** The whole answer in one sentence or two, for the eye and for a screen reader. */
  readonly sentence: (words: ReadingWords) => string
  readonly setPoint: (words: { target: string; ph: string }) => string
  readonly setPointInterval: (words: { low: string; high: string }) => string
  readonly mapTitle: string
  /** The table that says what the map shows. */
  readonly tableTitle: string
  readonly measuredTitle: string
  readonly phMeter: string
  readonly phMeters: Readonly<Record<PhMeter, string>>
  readonly khTest: string
  readonly khTests: Readonly<Record<KhTest, string>>
  /** By the caution's code; `livestock_…` by the band that the upper end lies in. */
  readonly cautions: Readonly<Record<string, (words: CautionWords) => string>>
  /** Why pH and KH cannot be so together, by the field that has to change. */
  readonly impossible: Readonly<Record<"ph" | "kh_dkh", string>>
  readonly method: string
}

export interface CautionWords {
  readonly kh: string
  readonly high: string
}
