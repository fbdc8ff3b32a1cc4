/** Small drawn marks: one stroke, no fill, sized by the text beside them. */
function Mark({ path, className = "size-4" }: { path: string; className?: string }) {
  return (
    <svg aria-hidden="true" viewBox="0 0 16 16" className={`inline-block shrink-0 ${className}`}>
      <path
        d={path}
        fill="none"
        stroke="currentColor"
        strokeWidth="1.5"
        strokeLinecap="square"
        strokeLinejoin="miter"
      />
    </svg>
  )
}

type MarkProps = { className?: string }

export const CopyMark = (props: MarkProps) => <Mark {...props} path="M5.5 5.5h8v8h-8zM10.5 5V2.5h-8v8H5" />
export const TickMark = (props: MarkProps) => <Mark {...props} path="M2.5 8.5l3.5 4 7.5-9" />
export const CloseMark = (props: MarkProps) => <Mark {...props} path="M3.5 3.5l9 9M12.5 3.5l-9 9" />
export const DownMark = (props: MarkProps) => <Mark {...props} path="M3.5 6l4.5 4.5L12.5 6" />
export const UpMark = (props: MarkProps) => <Mark {...props} path="M3.5 10L8 5.5l4.5 4.5" />
export const RightMark = (props: MarkProps) => <Mark {...props} path="M2 8h11M9 4l4 4-4 4" />
export const MenuMark = (props: MarkProps) => <Mark {...props} path="M2 4.5h12M2 8h12M2 11.5h12" />
export const CautionMark = (props: MarkProps) => (
  <Mark {...props} path="M8 2L14.5 13.5h-13zM8 6.5v3M8 11.3v.2" />
)
export const InfoMark = (props: MarkProps) => <Mark {...props} path="M1.5 1.5h13v13h-13zM8 7.5v4M8 4.6v.2" />
