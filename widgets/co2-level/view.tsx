import { Choice } from "@/widgets/shared/choice"
import { Fields } from "@/widgets/shared/fields"
import { Frame } from "@/widgets/shared/frame"
import { MethodView } from "@/widgets/shared/method"
import type { CalculatorProps } from "@/widgets/shared/mount"
import { Figure, Outcome } from "@/widgets/shared/outcome"
import { isCurrent } from "@/widgets/shared/sheet"
import { useSheet } from "@/widgets/shared/use-sheet"
import { useTank } from "@/widgets/shared/visit"
import type { Co2LevelMessages } from "./messages/co2-level-messages"
import { Ruler } from "./ruler"
import { co2Level, type Event, impossibleField, type State } from "./state"
import { WaterMap } from "./water-map"
import { cautionWords, type Speech, setPointWords, wordsOf } from "./words"

/** Of the method more than of the water, and no matter of safety: it is said where the method is explained. */
const asideCode = "common_chart"

/** The calculator *CO2 level*: what pH and KH say about CO2, and where to set the controller. */
export function Co2Level(props: CalculatorProps<Co2LevelMessages>) {
  const { shown, session, locale, messages } = props
  const inUse = useSheet(co2Level, props)
  const { sheet: state, change } = inUse
  useTank({ ...state.asked.values, level: state.answer.result.level })

  const impossible = impossibleField(state)
  return (
    <Frame title={messages.title} locale={locale} messages={messages.shared} shown={shown} session={session}>
      <div className="columns">
        <div className="inputs" part="inputs">
          <Fields
            inUse={inUse}
            labels={messages.fields}
            locale={locale}
            messages={messages.shared}
            refusal={impossible && { field: impossible, text: messages.impossible[impossible] }}
          />
          <Measured state={state} messages={messages} onChange={change} />
        </div>
        <Reading state={state} locale={locale} messages={messages} />
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
  const { phMeter, khTest } = state.choices
  const choose = (choices: Partial<State["choices"]>) => onChange({ type: "chosen", choices })
  return (
    <details className="details" part="measured">
      <summary>{messages.measuredTitle}</summary>
      <Choice
        label={messages.phMeter}
        value={phMeter}
        options={messages.phMeters}
        onChange={(phMeter) => choose({ phMeter })}
      />
      <Choice
        label={messages.khTest}
        value={khTest}
        options={messages.khTests}
        onChange={(khTest) => choose({ khTest })}
      />
    </details>
  )
}

/** The answer: figure, ruler, sentence, set-point, and what to keep in mind beside it. */
function Reading({ state, ...speech }: Speech & { readonly state: State }) {
  const { locale, messages } = speech
  const { answer: reading } = state
  const { result } = reading
  const words = wordsOf(state, speech)
  const setPoint = setPointWords(reading, speech)
  return (
    <Outcome
      isCurrent={isCurrent(state)}
      messages={messages.shared}
      sentence={messages.sentence(words)}
      cautions={reading.cautions.filter(({ code }) => code !== asideCode)}
      say={(caution) => cautionWords(caution, reading, words, speech)}
      reading={
        <>
          <Figure
            title={messages.figureTitle}
            figure={words.co2}
            unit="mg/L"
            beside={
              <span className={`level ${result.level}`} part="level">
                {words.level}
              </span>
            }
            interval={messages.interval(words)}
          />
          <Ruler result={result} locale={locale} />
        </>
      }
    >
      {setPoint && (
        <p className="set-point" part="set-point">
          {setPoint.advice} <span className="soft">{setPoint.interval}</span>
        </p>
      )}
    </Outcome>
  )
}
