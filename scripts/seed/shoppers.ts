import { randomUUID } from "node:crypto"
import { sql } from "kysely"
import type { Trx } from "@/db"
import { co2Level } from "@/lib/chemistry/level"
import { consentOf } from "@/lib/enquiries"
import type { Verdict } from "@/lib/flow/reactor-criteria"
import type { GasMethodName } from "@/lib/gas/methods"
import { newId } from "@/lib/id"
import type { Tank } from "@/lib/insights"
import type { Language } from "@/lib/mail"
import { randomFrom } from "./history"

/** Whose widget the invented shoppers used. */
interface Shop {
  readonly account_id: string
  readonly name: string
  readonly widget_id: string
  readonly origin: string
}

const DAYS = 365
const day_ms = 86_400_000

/** Writes a year of tanks that a shop's widgets were asked about. Does nothing for an account that has some. */
export async function writeTanks(trx: Trx, { account_id, widget_id }: Shop, now: Date): Promise<void> {
  const known = await trx
    .selectFrom("tank_event")
    .select("day")
    .where("account_id", "=", account_id)
    .limit(1)
    .execute()
  if (known.length > 0) return
  const tanks = tanksUntil(now)
  const column = <Value>(value: (tank: DatedTank) => Value) => tanks.map(value)
  await sql`
    insert into tank_event (account_id, session_id, widget_id, day, volume_l, ph, kh_dkh, temperature_c, method, level,
                            verdict)
    select ${account_id}, id, ${widget_id}, day, volume_l, ph, kh_dkh, temperature_c, method, level, verdict
      from unnest(${column(() => randomUUID())}::text[], ${column(({ day }) => day)}::date[],
                  ${column(({ volume_l }) => volume_l)}::float8[], ${column(({ ph }) => ph)}::float8[],
                  ${column(({ kh_dkh }) => kh_dkh)}::float8[],
                  ${column(({ temperature_c }) => temperature_c)}::float8[],
                  ${column(({ method }) => method ?? null)}::text[], ${column(({ level }) => level)}::text[],
                  ${column(({ verdict }) => verdict ?? null)}::text[])
        as tank (id, day, volume_l, ph, kh_dkh, temperature_c, method, level, verdict)`.execute(trx)
}

type DatedTank = Tank & { readonly day: string }

/** Tanks as a shop meets them: mostly 60 to 300 litres, waters of a soft and of a hard valley, more of them each month. */
function tanksUntil(now: Date): DatedTank[] {
  const random = randomFrom(20_261_202)
  const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())
  const between = (low: number, high: number, value: number) => Math.min(high, Math.max(low, value))
  const tanks: DatedTank[] = []
  for (let ago = DAYS - 1; ago >= 0; ago -= 1) {
    const count = Math.floor(2 + 4 * (1 - ago / DAYS) + 2 * random())
    for (let each = 0; each < count; each += 1) {
      const volume_l = Math.round(between(12, 1500, 145 * Math.exp(0.75 * normal())))
      const kh_dkh =
        Math.round(2 * between(0.5, 22, random() < 0.62 ? 4 + 1.4 * normal() : 11 + 3 * normal())) / 2
      const ph = Math.round(20 * between(5.6, 8.2, 6.42 + 0.26 * Math.log2(kh_dkh) + 0.22 * normal())) / 20
      const temperature_c = Math.round(between(19, 30, 24.6 + 1.3 * normal()))
      // The printed chart's rule with a pen's and a drop test's doubt: invented tanks need no better, and no time.
      const level = co2Level(1.4 * 3 * kh_dkh * 10 ** (7 - ph))
      const method = random() < 0.55 ? methodFor(volume_l, random()) : undefined
      tanks.push({
        day: new Date(now.getTime() - ago * day_ms).toISOString().slice(0, 10),
        ...{ volume_l, kh_dkh, ph, temperature_c, method, level },
        verdict: method === "inline_reactor" ? verdictFor(random()) : undefined,
      })
    }
  }
  return tanks
}

function methodFor(volume_l: number, chance: number): GasMethodName {
  if (volume_l < 80) return chance < 0.85 ? "diffuser" : "inline_diffuser"
  return chance < 0.5 ? "inline_reactor" : chance < 0.75 ? "inline_diffuser" : "diffuser"
}

function verdictFor(chance: number): Verdict {
  return chance < 0.62 ? "suitable" : chance < 0.87 ? "marginal" : "unsuitable"
}

interface Question {
  readonly days_ago: number
  readonly language: Language
  readonly name: string | null
  readonly address: string
  readonly message: string
  readonly tank: Tank
  readonly isErased?: true
}

/** Invented, as everything here; `.test` reaches nobody (RFC 2606). */
const questions: readonly Question[] = [
  {
    ...{
      days_ago: 52,
      language: "en",
      name: "Ottoline Varga",
      address: "ottoline@shopper.test",
      isErased: true,
    },
    message: "Do you have the 16 mm unions in stock?",
    tank: { ph: 6.7, kh_dkh: 4, temperature_c: 25, level: "in_range" },
  },
  {
    ...{ days_ago: 31, language: "de", name: "Henrike Staub", address: "henrike@shopper.test" },
    message:
      "Mein Wasser hat 14 dKH und der Rechner empfiehlt pH 7,2. Ist das bei Ihrem Leitungswasser üblich, oder sollte ich mischen?",
    tank: { ph: 7.3, kh_dkh: 14, temperature_c: 24, level: "in_range" },
  },
  {
    ...{ days_ago: 17, language: "en", name: null, address: "jory@shopper.test" },
    message: "Will the Rill 25 hold with a 700 l/h filter on a 180 litre tank, or is that too slow?",
    tank: { ph: 6.9, kh_dkh: 5, temperature_c: 25, level: "low" },
  },
  {
    ...{ days_ago: 9, language: "es", name: "Iria Montoro", address: "iria@shopper.test" },
    message: "¿Rellenan botellas de 2 kg en la tienda de Old Wharf? ¿Hay que pedir cita?",
    tank: { ph: 6.6, kh_dkh: 4, temperature_c: 26, level: "high" },
  },
  {
    ...{ days_ago: 4, language: "ja", name: "南 海斗", address: "kaito@shopper.test" },
    message: "60cm水槽（57L）で、外部フィルターは小型です。インライン式と内部式のどちらが向いていますか。",
    tank: { ph: 6.5, kh_dkh: 3, temperature_c: 25, level: "in_range" },
  },
  {
    ...{ days_ago: 1, language: "en", name: "Bram Oakeshott", address: "bram@shopper.test" },
    message:
      "My drop checker is yellow but the widget says 22 mg/L. Which of the two do I believe?\nThe shrimp look fine so far.",
    tank: { ph: 6.75, kh_dkh: 4.5, temperature_c: 24, level: "in_range" },
  },
]

/** Writes a few questions of shoppers, the oldest already erased. Does nothing for an account that has some. */
export async function writeEnquiries(
  trx: Trx,
  { account_id, name: shop, widget_id, origin }: Shop,
  now: Date,
): Promise<void> {
  const known = await trx
    .selectFrom("enquiry")
    .select("id")
    .where("account_id", "=", account_id)
    .limit(1)
    .execute()
  if (known.length > 0) return
  const rows = questions.map(({ days_ago, language, name, address, message, tank, isErased }) => {
    const at = new Date(now.getTime() - days_ago * day_ms - 5_400_000)
    const { version, wording } = consentOf(shop, language)
    return {
      ...{ account_id, id: newId("enquiry"), widget_id, page_origin: origin, language },
      name: isErased ? null : name,
      email: isErased ? null : address,
      message: isErased ? null : message,
      tank: isErased ? null : JSON.stringify(tank),
      ...{ consent_version: version, consent_wording: wording, consented_at: at, created_at: at },
      erased_at: isErased ? new Date(at.getTime() + 3 * day_ms) : null,
      erased_by: isErased ? "shopper" : null,
    }
  })
  await trx.insertInto("enquiry").values(rows).execute()
}
