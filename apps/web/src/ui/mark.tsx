import { Drawing } from './drawing'
import type { Drawing as DrawingName } from './drawings'

export type MarkName = 'present' | 'late' | 'absent' | 'excused' | 'not-yet'

const DRAWN: Record<MarkName, DrawingName> = {
  present: 'present',
  late: 'late',
  absent: 'absent',
  excused: 'excused',
  'not-yet': 'notYet',
}

const SPOKEN: Record<MarkName, string> = {
  present: 'Present',
  late: 'Late',
  absent: 'Absent',
  excused: 'Excused',
  'not-yet': 'Not yet',
}

/** A golfer at a session, in pencil: told apart by shape first. */
export function Mark({ mark, isSilent }: { mark: MarkName; isSilent?: boolean }) {
  const isSofter = mark === 'excused' || mark === 'not-yet'
  return (
    <Drawing
      of={DRAWN[mark]}
      className={isSofter ? 'm softer' : 'm'}
      {...(isSilent ? {} : { label: SPOKEN[mark] })}
    />
  )
}

export const markName = (mark: MarkName): string => SPOKEN[mark]

export function MarkKey() {
  const marks: MarkName[] = ['present', 'late', 'absent', 'excused', 'not-yet']
  return (
    <ul className="key">
      {marks.map((mark) => (
        <li key={mark}>
          <Mark mark={mark} isSilent /> {SPOKEN[mark]}
        </li>
      ))}
      <li>
        <span className="off swatch" aria-hidden /> Called off
      </li>
    </ul>
  )
}
