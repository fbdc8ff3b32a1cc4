import type { Metadata } from "next"
import { PageHead, Section } from "@/app/ui/sheet"
import { minuteOf } from "@/app/ui/time"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import { databaseAnswers } from "@/lib/usage"
import { FromHere } from "./from-here"

export const metadata: Metadata = { title: "Status" }

interface Check {
  readonly what: string
  readonly works: boolean
  readonly took_ms: number
}

export default async function Status() {
  const checks = [
    await check("Keys and metering: the database answers", databaseAnswers),
    await check("Engine: a carbonate calculation", async () => {
      const { result } = co2FromPh({ ...carbonateDefaults, ph: 6.8, kh_dkh: 4 })
      // Within what any published set of constants gives for this water (reference/carbonate-published.csv).
      if (!(result.co2_mg_l > 18 && result.co2_mg_l < 24)) throw new Error("The engine is off")
    }),
  ]
  const allWork = checks.every(({ works }) => works)
  return (
    <>
      <PageHead
        title={allWork ? "Everything works" : "Something does not work"}
        lead={`Checked when you opened this page, ${minuteOf(new Date())}. Engine ${ENGINE_VERSION}.`}
      />
      <Section title="On our side" note="Made by the server that sent you this page.">
        <dl className="max-w-measure divide-y divide-line border-y border-line">
          {checks.map(({ what, works, took_ms }) => (
            <div key={what} className="flex flex-wrap justify-between gap-x-6 py-2.5">
              <dt>{what}</dt>
              <dd className={works ? "text-action" : "text-danger"}>
                {works ? "works" : "does not work"}{" "}
                <span className="ml-2 font-mono text-sm text-soft">{took_ms.toFixed(1)} ms</span>
              </dd>
            </div>
          ))}
        </dl>
      </Section>
      <Section title="From where you are" note="Asked by your browser, five times.">
        <FromHere />
      </Section>
    </>
  )
}

async function check(what: string, run: () => Promise<unknown>): Promise<Check> {
  const begin = performance.now()
  const works = await run().then(
    () => true,
    () => false,
  )
  return { what, works, took_ms: performance.now() - begin }
}
