import { useEffect, useMemo, useReducer } from "react"
import { Cautions } from "@/widgets/shared/cautions"
import { FieldView } from "@/widgets/shared/field-view"
import { Frame, useSessionState } from "@/widgets/shared/frame"
import { numberWriter } from "@/widgets/shared/locale"
import { MethodView } from "@/widgets/shared/method"
import type { CalculatorProps } from "@/widgets/shared/mount"
import { useSettled } from "@/widgets/shared/settled"
import { isCurrent } from "@/widgets/shared/sheet"
import { useTank } from "@/widgets/shared/visit"
import { waterFields } from "@/widgets/shared/water-fields"
import type { Co2LevelMessages } from "./messages/co2-level-messages"
import { Ruler } from "./ruler"
import {
  type Event,
  fieldNames,
  impossibleField,
  type KhTest,
  khTests,
  nextState,
  type PhMeter,
  phMeters,
  type State,
  startState,
} from "./state"
import { WaterMap } from "./water-map"
import { cautionWords, type Speech, setPointWords, wordsOf } from "./words"

/** Of the method more than of the water, and no matter of safety: it is said where the method is explained. */
const asideCode = "common_chart"

/** The calculator *CO2 level*: what pH and KH say about CO2, and where to set the controller. */
export function Co2Level({ shown, session, locale, messages }: CalculatorProps<Co2LevelMessages>) {
  const write = useMemo(() => numberWriter(locale), [locale])
  const [state, tell] = useReducer(
    (state: State, event: Event) => nextState(state, event, write),
    shown,
    (shown) => startState(shown, write),
  )
  const sessionState = useSessionState(session)
  useEffect(() => {
    tell({ type: "paused", isPaused: sessionState === "resting" || sessionState === "closed" })
  }, [sessionState])

  useTank({ ...state.asked.values, level: state.answer.result.level })

  function change(event: Event): void {
    session.begin()
    tell(event)
  }

  return (
    <Frame title={messages.title} locale={locale} messages={messages.shared} shown={shown} session={session}>
      <div className="columns">
        <div className="inputs" part="inputs">
          {fieldNames.map((name) => (
            <FieldView
              key={name}
              kind={waterFields[name]}
              field={state.fields[name]}
              label={messages.fields[name]}
              locale={locale}
              messages={messages.shared}
              refusal={impossibleField(state) === name ? messages.impossible[name] : null}
              onType={(text) => change({ type: "typed", field: name, text })}
              onSlide={(value) => change({ type: "slid", field: name, shown: value })}
              onUnit={(unit) => change({ type: "unit_chosen", field: name, unit })}
            />
          ))}
          <Measured state={state} messages={messages} onChange={change} />
        </div>
        <Outcome state={state} locale={locale} messages={messages} />
        <WaterMap state={state} locale={locale} messages={messages} />
      </div>
      <MethodView
        method={state.answer.method}
        messages={messages.shared}
        explanation={`${messages.method} ${messages.cautions[asideCode]?.(wordsOf(state, { locale, messages }))}`}
      />
    </Frame>
  )
}

interface MeasuredProps {
  readonly state: State
  readonly messages: Co2LevelMessages
  onChange(event: Event): void
}

/** With what the shopper measured: the width of the interval hangs on it. */
function Measured({ state, messages, onChange }: MeasuredProps) {
  return (
    <details className="details" part="measured">
      <summary>{messages.measuredTitle}</summary>
      <label className="choice">
        <span className="label">{messages.phMeter}</span>
        <select
          value={state.choices.phMeter}
          onChange={({ currentTarget }) =>
            onChange({ type: "chosen", choices: { phMeter: currentTarget.value as PhMeter } })
          }
        >
          {Object.keys(phMeters).map((name) => (
            <option key={name} value={name}>
              {messages.phMeters[name as PhMeter]}
            </option>
          ))}
        </select>
      </label>
      <label className="choice">
        <span className="label">{messages.khTest}</span>
        <select
          value={state.choices.khTest}
          onChange={({ currentTarget }) =>
            onChange({ type: "chosen", choices: { khTest: currentTarget.value as KhTest } })
          }
        >
          {Object.keys(khTests).map((name) => (
            <option key={name} value={name}>
              {messages.khTests[name as KhTest]}
            </option>
          ))}
        </select>
      </label>
    </details>
  )
}

/** The answer: figure, ruler, sentence, set-point, and what to keep in mind beside it. */
function Outcome({ state, ...speech }: Speech & { readonly state: State }) {
  const { locale, messages } = speech
  const { answer: reading } = state
  const { result } = reading
  const words = wordsOf(state, speech)
  const sentence = useSettled(messages.sentence(words))
  const setPoint = setPointWords(reading, speech)
  return (
    <div className="outcome" part="outcome" data-current={isCurrent(state)}>
      <div className="reading" aria-hidden="true">
        <p className="label">{messages.figureTitle}</p>
        <p className="line">
          <span className="figure" part="figure">
            {words.co2}
            <span className="figure-unit"> mg/L</span>
          </span>
          <span className={`level ${result.level}`} part="level">
            {words.level}
          </span>
        </p>
        <p className="interval-text">{messages.interval(words)}</p>
        <Ruler result={result} locale={locale} />
      </div>
      {/* biome-ignore lint/a11y/noRedundantRoles: some screen readers know the role and not the element. */}
      <output className="sentence" part="sentence" role="status" aria-live="polite">
        {sentence}
      </output>
      {!isCurrent(state) && <p className="stale">{messages.shared.lastResult}</p>}
      {setPoint && (
        <p className="set-point" part="set-point">
          {setPoint.advice} <span className="soft">{setPoint.interval}</span>
        </p>
      )}
      <Cautions
        cautions={reading.cautions.filter(({ code }) => code !== asideCode)}
        messages={messages.shared}
        say={(caution) => cautionWords(caution, reading, words, speech)}
      />
    </div>
  )
}
