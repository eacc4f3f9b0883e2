import { DRAWINGS, type Drawing as DrawingName } from './drawings'

/** A small drawing beside words; it says nothing by itself unless it is given a label. */
export function Drawing(props: { of: DrawingName; className?: string; label?: string }) {
  const { viewBox, paths } = DRAWINGS[props.of]
  const spoken = props.label
    ? ({ role: 'img', 'aria-label': props.label } as const)
    : ({ 'aria-hidden': true } as const)
  return (
    <svg viewBox={viewBox} className={props.className} fill="currentColor" {...spoken}>
      {paths}
    </svg>
  )
}
