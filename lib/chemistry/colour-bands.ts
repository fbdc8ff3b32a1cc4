/** What a colour of bromothymol blue says: the pH lies between these two. */
export interface ColourBand {
  readonly colour: string
  readonly ph_from: number
  readonly ph_to: number
  /** The scale ends here: the true pH may lie beyond `ph_from` or `ph_to`. */
  readonly open?: "below" | "above"
}

/**
 * The drop checker's reading as data: edit it for another dye or another card.
 *
 * @source crcIndicators2016: bromothymol blue turns between pH 6.0 (yellow) and 7.6 (blue). The limits between the
 * mixed colours are common practice, no source; pKa 7.10 puts a quarter of the dye in its blue form at pH 6.65.
 */
export const colourBands: readonly ColourBand[] = [
  { colour: "yellow", ph_from: 5.6, ph_to: 6.0, open: "below" },
  { colour: "yellow_green", ph_from: 6.0, ph_to: 6.4 },
  { colour: "green", ph_from: 6.4, ph_to: 6.9 },
  { colour: "blue_green", ph_from: 6.9, ph_to: 7.6 },
  { colour: "blue", ph_from: 7.6, ph_to: 8.2, open: "above" },
]
