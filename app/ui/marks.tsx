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

export const CopyMark = (props: MarkProps) => (
  <Mark {...props} path="M5.500 5.500h8v8h-8zM10.500 5V2.500h-8v8H5" />
)
export const TickMark = (props: MarkProps) => <Mark {...props} path="M2.500 8.500l3.500 4 7.500-9" />
export const CloseMark = (props: MarkProps) => <Mark {...props} path="M3.500 3.500l9 9M12.500 3.500l-9 9" />
export const DownMark = (props: MarkProps) => <Mark {...props} path="M3.500 6l4.500 4.500L12.500 6" />
export const UpMark = (props: MarkProps) => <Mark {...props} path="M3.500 10L8 5.500l4.500 4.500" />
export const RightMark = (props: MarkProps) => <Mark {...props} path="M2 8h11M9 4l4 4-4 4" />
export const MenuMark = (props: MarkProps) => <Mark {...props} path="M2 4.500h12M2 8h12M2 11.500h12" />
export const CautionMark = (props: MarkProps) => (
  <Mark {...props} path="M8 2L14.500 13.500h-13zM8 6.500v3M8 11.300v.2" />
)
export const InfoMark = (props: MarkProps) => (
  <Mark {...props} path="M1.500 1.500h13v13h-13zM8 7.500v4M8 4.600v.2" />
)
