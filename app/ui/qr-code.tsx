import { encode } from "uqr"

/** A text as a QR code, drawn here: no other site learns of it. Dark on light in every theme, as cameras want it. */
export function QrCode({ text, label }: { text: string; label: string }) {
  const { size, data } = encode(text, { border: 4, ecc: "M" })
  const modules = data.flatMap((row, y) => row.map((dark, x) => (dark ? `M${x} ${y}h1v1h-1z` : "")))
  return (
    <svg
      role="img"
      aria-label={label}
      viewBox={`0 0 ${size} ${size}`}
      shapeRendering="crispEdges"
      className="size-48 rounded border border-edge"
    >
      <rect width={size} height={size} fill="#ffffff" />
      <path d={modules.join("")} fill="#10211c" />
    </svg>
  )
}
