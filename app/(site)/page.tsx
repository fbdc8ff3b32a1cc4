import Link from "next/link"
import { ButtonLink } from "@/app/ui/button"
import { CodeBlock } from "@/app/ui/code-block"
import { Section } from "@/app/ui/sheet"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { env } from "@/lib/env"
import { roundSignificant } from "@/lib/units/figures"
import { PlanTable } from "./plan-table"
import { TankPlan } from "./tank-plan"
import { WaterLevel } from "./water-level"

export default function Home() {
  return (
    <>
      <div className="max-w-3xl pb-14">
        <h1 className="text-4xl sm:text-5xl">CO2 answers for planted aquariums, each with how sure it is</h1>
        <p className="mt-5 max-w-measure text-lg text-soft">
          One engine for level, set-point, gas, lead time, flow and cylinder life. Your web shop, your app,
          your packaging and your counter give the same number, by an API or by a widget.
        </p>
        <div className="mt-8 flex flex-wrap gap-3">
          <ButtonLink look="primary" href="/signup">
            Open an account
          </ButtonLink>
          <ButtonLink href="/docs">First call in five minutes</ButtonLink>
        </div>
      </div>

      <section aria-labelledby="your-tank" className="border-t border-line py-10">
        <h2 id="your-tank" className="text-2xl">
          Your tank
        </h2>
        <p className="mt-2 mb-8 max-w-measure text-soft">
          Change a number: the whole system is worked out again, here in your browser. A call of{" "}
          <code>POST /api/v1/plan</code> gives the same.
        </p>
        <TankPlan />
      </section>

      <section aria-labelledby="your-water" className="border-t border-line py-10">
        <h2 id="your-water" className="text-2xl">
          Your water
        </h2>
        <p className="mt-2 mb-8 max-w-measure text-soft">
          What pH and hardness say about CO2, where it lies among all waters, and how far the meter and the
          test kit may be off.
        </p>
        <WaterLevel />
      </section>

      <Section
        title="One call"
        note={
          <>
            Every answer carries its interval, cautions, assumptions, method and sources.{" "}
            <Link className="link" href="/docs">
              How to make it
            </Link>
          </>
        }
      >
        <div className="grid gap-6 lg:grid-cols-2 [&>*]:min-w-0">
          <CodeBlock what="Request" code={requestExample()} />
          <CodeBlock what="Answer, shortened" code={answerExample()} />
        </div>
      </Section>

      <Section
        title="Plans"
        note="A simple calculation costs 1 unit, a simulation 2, a whole plan 5. The sandbox is free."
      >
        <PlanTable />
      </Section>
    </>
  )
}

const example = { ph: 6.8, kh_dkh: 4 }

function requestExample(): string {
  return `curl ${env().PUBLIC_URL}/api/v1/carbonate/co2 \\
  -H "Authorization: Bearer $TARNWRIGHT_KEY" \\
  -H "Content-Type: application/json" \\
  -d '${JSON.stringify(example)}'`
}

function answerExample(): string {
  const { result, cautions, method } = co2FromPh({ ...carbonateDefaults, ...example })
  const { co2_mg_l, co2_low_mg_l, co2_high_mg_l, level, degassed_ph } = result
  return JSON.stringify(
    {
      result: {
        co2_mg_l: roundSignificant(co2_mg_l),
        co2_low_mg_l: roundSignificant(co2_low_mg_l),
        co2_high_mg_l: roundSignificant(co2_high_mg_l),
        level,
        degassed_ph: roundSignificant(degassed_ph),
      },
      cautions: cautions.slice(0, 1),
      method: { name: method.name, version: method.version },
    },
    null,
    2,
  )
}
