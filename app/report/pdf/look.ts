import { StyleSheet } from "@react-pdf/renderer"
import { mono, text } from "./fonts"

/** The light theme of app/tokens.css, on white paper. */
export const colours = {
  paper: "#ffffff",
  ink: "#10211c",
  soft: "#4c5b55",
  line: "#cfd0c2",
  sunk: "#ecebe0",
  action: "#1f6b4a",
  warning: "#8a5700",
  danger: "#a3281f",
  water: "#2f6fb0",
} as const

export const look = StyleSheet.create({
  page: {
    paddingTop: 44,
    paddingBottom: 56,
    paddingHorizontal: 48,
    fontFamily: text,
    fontSize: 9.5,
    color: colours.ink,
  },
  // Not on the page itself: there it would push what stands at the foot off the paper.
  body: { fontSize: 9.5, lineHeight: 1.4 },
  head: { flexDirection: "row", justifyContent: "space-between", alignItems: "flex-end", marginBottom: 4 },
  shop: { fontSize: 9.5, color: colours.soft },
  title: { fontSize: 20, fontWeight: 700, lineHeight: 1.2 },
  about: { color: colours.soft, paddingBottom: 8, borderBottomWidth: 1, borderBottomColor: colours.ink },
  heading: { fontSize: 13, fontWeight: 700, marginTop: 18, marginBottom: 4 },
  line: {
    flexDirection: "row",
    borderTopWidth: 0.5,
    borderTopColor: colours.line,
    paddingVertical: 3,
  },
  name: { width: "38%" },
  metric: { width: "34%", fontFamily: mono, fontSize: 8 },
  us: { width: "28%", fontFamily: mono, fontSize: 8, color: colours.soft },
  big: { fontFamily: mono, fontSize: 11, fontWeight: 500 },
  caution: {
    marginTop: 5,
    paddingLeft: 8,
    borderLeftWidth: 2,
    borderLeftColor: colours.line,
  },
  danger: { borderLeftColor: colours.danger },
  warning: { borderLeftColor: colours.warning },
  word: { fontWeight: 700 },
  item: {
    flexDirection: "row",
    borderTopWidth: 0.5,
    borderTopColor: colours.line,
    paddingVertical: 3,
  },
  lead: { width: "26%", paddingRight: 10, fontWeight: 600 },
  number: { width: 22, fontFamily: mono, fontSize: 8, color: colours.soft },
  told: { flex: 1 },
  drawing: { marginTop: 6, width: "100%", height: 404 },
  small: { fontSize: 8, color: colours.soft, lineHeight: 1.35 },
  foot: {
    position: "absolute",
    left: 48,
    right: 48,
    bottom: 24,
    flexDirection: "row",
    justifyContent: "space-between",
    fontSize: 7.5,
    color: colours.soft,
  },
})
