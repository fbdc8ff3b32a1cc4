import { CARDS, type CardKind } from "../billing/cards"
import { type Html, html } from "./html"

/** The choice among practice cards; nobody types a card number here. */
export function cardsField(chosen: CardKind): Html {
  const choices = (Object.keys(CARDS) as CardKind[]).map(
    (kind) => html`<label><input type="radio" name="card" value="${kind}"${mark(kind === chosen)} required>
<span>Card ending ${CARDS[kind].last4}, which ${CARDS[kind].label}</span></label>`,
  )
  return html`<fieldset><legend>Practice card</legend>${choices}</fieldset>`
}

function mark(checked: boolean): Html {
  return checked ? html` checked` : html``
}
