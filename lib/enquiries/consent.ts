import { createHash } from "node:crypto"
import type { Language } from "@/lib/mail"
import { ENQUIRY_DAYS } from "@/lib/usage"

/** The words that a shopper agrees to, and the name by which the record of it finds them again. */
export interface Consent {
  readonly version: string
  readonly wording: string
}

/** Day of the last change to the words below. */
const edition = "2026-12-01"

/** Who keeps what, for what, how long, and how it ends. @source GDPR art. 4(11), 7 and 13; PLATFORM 4.16 */
const wordings: Record<Language, (shop: string, days: number) => string> = {
  en: (shop, days) =>
    `${shop} may keep my e-mail address, my message, my name if I give it, and the figures of my tank, to answer ` +
    `this question and for nothing else, for at most ${days} days. I can withdraw this at any time by the link in ` +
    "the copy that is mailed to me; my data is then erased.",
  de: (shop, days) =>
    `${shop} darf meine E-Mail-Adresse, meine Nachricht, meinen Namen, falls ich ihn nenne, und die Werte meines ` +
    `Aquariums speichern, um diese Frage zu beantworten und für nichts sonst, höchstens ${days} Tage lang. Ich kann ` +
    "das jederzeit über den Link in der Kopie widerrufen, die ich per Mail bekomme; meine Daten werden dann gelöscht.",
  es: (shop, days) =>
    `${shop} puede conservar mi correo electrónico, mi mensaje, mi nombre si lo indico y los datos de mi acuario ` +
    `para responder a esta pregunta y para nada más, durante ${days} días como máximo. Puedo retirar este ` +
    "consentimiento en cualquier momento con el enlace de la copia que recibo por correo; entonces se borran mis datos.",
  ja: (shop, days) =>
    `${shop}が、この質問に答える目的に限り、私のメールアドレス、メッセージ、（入力した場合は）名前、水槽の数値を最長${days}日間` +
    "保管することに同意します。同意は、メールで届く控えのリンクからいつでも取り消すことができ、その場合データは消去されます。",
}

/** What a shopper of this shop agrees to in this language. Another word or another name is another version. */
export function consentOf(shop: string, language: Language): Consent {
  const wording = wordings[language](shop, ENQUIRY_DAYS)
  const digest = createHash("sha256").update(wording).digest("hex").slice(0, 12)
  return { version: `${edition}.${language}.${digest}`, wording }
}
