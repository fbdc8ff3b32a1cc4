import type { Caution } from "@/lib/chemistry/answer"
import { co2Band } from "@/lib/chemistry/level"
import { shownValue, symbolOf } from "@/widgets/shared/field"
import { fixed, type Locale, numberWriter, significant } from "@/widgets/shared/locale"
import type { Co2LevelMessages, ReadingWords } from "./messages/co2-level-messages"
import { type FieldName, type Reading, type State, TARGET_CO2_MG_L } from "./state"

/** No more digits than a pH pen and a drop test can carry. @source CHEMISTRY 11, pitfall 6 */
const DIGITS = 2

/** What a reading needs to be put into words. */
export interface Speech {
  readonly locale: Locale
  readonly messages: Co2LevelMessages
}

/** The numbers of the answer as the locale writes them, each in the unit of its field. */
export function wordsOf({ answer, asked, fields }: State, { locale, messages }: Speech): ReadingWords {
  const { result } = answer
  const write = numberWriter(locale)
  const inUnit = (name: FieldName) => {
    const { unit } = fields[name]
    return `${write(shownValue(asked.values[name], unit), unit.decimals)} ${symbolOf(unit)}`.trim()
  }
  return {
    ph: inUnit("ph"),
    kh: inUnit("kh_dkh"),
    temperature: inUnit("temperature_c"),
    co2: significant(result.co2_mg_l, DIGITS, locale),
    low: result.co2_low_mg_l === 0 ? null : significant(result.co2_low_mg_l, DIGITS, locale),
    high: significant(result.co2_high_mg_l, DIGITS, locale),
    level: messages.levels[result.level],
  }
}

/** The controller's set-point in words, or null where no pH gives the target. */
export function setPointWords({ setPoint }: Reading, { locale, messages }: Speech) {
  if (!setPoint) return null
  const ph = (value: number) => fixed(value, 2, locale)
  const target = significant(TARGET_CO2_MG_L, DIGITS, locale)
  return {
    advice: messages.setPoint({ target, ph: ph(setPoint.ph) }),
    interval: messages.setPointInterval({ low: ph(setPoint.ph_low), high: ph(setPoint.ph_high) }),
  }
}

/** A caution in the shopper's language, or undefined where the catalogue does not know it. */
export function cautionWords(
  caution: Caution,
  { result }: Reading,
  words: ReadingWords,
  { messages }: Pick<Speech, "messages">,
): string | undefined {
  return messages.cautions[nameOf(caution, result.co2_high_mg_l)]?.(words)
}

/** `livestock` says something else in each band of the engine. */
function nameOf({ code }: Caution, co2_high_mg_l: number): string {
  if (code !== "livestock") return code
  const { up_to_mg_l } = co2Band(co2_high_mg_l)
  return `livestock_${up_to_mg_l <= 30 ? "30" : Number.isFinite(up_to_mg_l) ? up_to_mg_l : "above"}`
}
