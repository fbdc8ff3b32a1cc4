const dateForm = new Intl.DateTimeFormat("en-GB", {
  day: "numeric",
  month: "short",
  year: "numeric",
  timeZone: "UTC",
})
const minuteForm = new Intl.DateTimeFormat("en-GB", {
  day: "numeric",
  month: "short",
  year: "numeric",
  hour: "2-digit",
  minute: "2-digit",
  timeZone: "UTC",
})

/** A day, in UTC like every period and every limit of ours. */
export function dayOf(instant: string | Date): string {
  return dateForm.format(new Date(instant))
}

/** A minute, in UTC. */
export function minuteOf(instant: string | Date): string {
  return `${minuteForm.format(new Date(instant))} UTC`
}

/** A day; its minute when one points at it. */
export function Day({ at }: { at: string }) {
  return (
    <time dateTime={at} title={minuteOf(at)} className="whitespace-nowrap">
      {dayOf(at)}
    </time>
  )
}

export function Minute({ at }: { at: string }) {
  return (
    <time dateTime={at} className="whitespace-nowrap">
      {minuteOf(at)}
    </time>
  )
}
