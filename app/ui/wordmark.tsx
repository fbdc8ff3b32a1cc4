import Link from "next/link"

/**
 * The name in lower case, standing in a vessel: the line under it is a meniscus, as one reads it in a measuring
 * cylinder.
 */
export function Wordmark({ href = "/" }: { href?: string }) {
  return (
    <Link href={href} className="inline-block text-ink" aria-label="Tarnwright, home">
      <span aria-hidden="true" className="block text-xl leading-none font-semibold tracking-[-0.03em]">
        tarnwright
      </span>
      <svg
        aria-hidden="true"
        viewBox="0 0 100 6"
        preserveAspectRatio="none"
        className="mt-1 block h-1.5 w-0 min-w-full text-action"
      >
        <path
          d="M0.7 0C1.2 3.800 3 5 6.500 5H93.500C97 5 98.800 3.800 99.300 0"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.5"
          vectorEffect="non-scaling-stroke"
        />
      </svg>
    </Link>
  )
}
