import type { Co2Level } from "@/lib/chemistry/level"
import type { Verdict } from "@/lib/flow/reactor-criteria"
import type { GasMethodName } from "@/lib/gas/methods"

/** What a widget was asked about and what it answered: figures of a tank, nothing of a person. */
export interface Tank {
  readonly volume_l?: number | undefined
  readonly ph?: number | undefined
  readonly kh_dkh?: number | undefined
  readonly temperature_c?: number | undefined
  /** How the gas gets in, as the widget advised or was told. */
  readonly method?: GasMethodName | undefined
  /** How the CO2 of the water was judged. */
  readonly level?: Co2Level | undefined
  /** How the reactor on its return line was judged. */
  readonly verdict?: Verdict | undefined
}
