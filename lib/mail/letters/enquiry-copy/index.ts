import type { Letter } from "../../compose"
import type { Language } from "../../languages"
import { de } from "./de"
import { en } from "./en"
import type { EnquiryCopyMessages } from "./enquiry-copy-messages"
import { es } from "./es"
import { ja } from "./ja"

export interface EnquiryCopyData {
  language: Language
  shop_name: string
  /** null when the shopper gave none. */
  name: string | null
  message: string
  /** Figures of the tank by their names; null when none went with it. */
  tank: { readonly [Name in keyof EnquiryCopyMessages["figures"]]?: number | undefined } | null
  withdraw_url: string
}

const catalogues: Record<Language, EnquiryCopyMessages> = { en, de, es, ja }

/** A shopper's copy of what they asked, in the language in which they asked. */
export function enquiryCopy(data: EnquiryCopyData): Letter {
  const { language, shop_name, name, message, tank, withdraw_url } = data
  const words = catalogues[language]
  const write = new Intl.NumberFormat(language, { maximumSignificantDigits: 4 })
  const figures = (Object.keys(words.figures) as (keyof typeof words.figures)[]).flatMap((figure) => {
    const value = tank?.[figure]
    return value === undefined ? [] : [words.figures[figure](write.format(value))]
  })
  return {
    language,
    subject: words.subject(shop_name),
    paragraphs: [
      words.greeting(name),
      words.received(shop_name),
      words.message(message),
      ...(figures.length > 0 ? [[words.tank, ...figures].join("\n")] : []),
      words.withdraw(shop_name),
    ],
    action: { label: words.withdrawLabel, url: withdraw_url },
    reason: words.reason(shop_name),
  }
}
