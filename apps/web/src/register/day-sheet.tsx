import { useEffect, useState } from 'react'
import { formatTime } from '@marram/schedule/format'
import { sentenceOf } from '../api/problem'
import { listOf } from '../clinics/list-of'
import { Mark, markName } from '../ui/mark'
import { Notice } from '../ui/notice'
import {
  useCloseRegister,
  useMarkPlace,
  type Register,
  type RegisterRow,
  type SetMark,
} from './queries'

const MARKS: readonly SetMark[] = ['present', 'late', 'absent', 'excused']
const UNDO_MS = 10_000

interface Undo {
  text: string
  placeId: string
  mark: SetMark | null
}

/** One register, for a gloved thumb: a row is present, Other has the four marks. */
export function DaySheet(props: {
  academy: string
  date: string
  register: Register
  locale: string
}) {
  const { academy, date, register, locale } = props
  const { session, rows } = register
  const mark = useMarkPlace(academy, date)
  const close = useCloseRegister(academy)
  const [openRow, setOpenRow] = useState<string | null>(null)
  const [undo, setUndo] = useState<Undo | null>(null)
  const isClosed = session.registerState === 'closed'
  const marked = rows.filter((row) => row.mark !== null).length
  const error = mark.error ?? close.error

  useEffect(() => {
    if (!undo) return
    const timer = setTimeout(() => setUndo(null), UNDO_MS)
    return () => clearTimeout(timer)
  }, [undo])

  const press = (row: RegisterRow, next: SetMark | null) => {
    mark.mutate({ sessionId: session.id, placeId: row.placeId, mark: next })
    const first = row.name.split(' ')[0] ?? row.name
    const text = next
      ? `${first} is marked ${markName(next).toLowerCase()}`
      : `${first}'s mark is gone`
    setUndo({ text, placeId: row.placeId, mark: row.mark })
    setOpenRow(null)
  }
  const takeBack = () => {
    if (!undo) return
    mark.mutate({ sessionId: session.id, placeId: undo.placeId, mark: undo.mark })
    setUndo(null)
  }
  const time = (at: string) => formatTime({ at, zone: session.zone, locale })

  return (
    <>
      <div className="p-4">
        <h2>{session.clinicTitle}</h2>
        <p>
          {listOf(session.areas.map(({ name }) => name))}, until {time(session.endsAt)}.
          <br />
          {isClosed ? 'The register is closed. ' : 'Press a name for present. '}
          {session.duskAt && <b className="haartext">Sunset {time(session.duskAt)}</b>}
        </p>
      </div>
      {session.state === 'called-off' && (
        <Notice drawing="wind">Called off: {session.calledOffReason}. There is no register.</Notice>
      )}
      {error && <Notice kind="flag">{sentenceOf(error)}</Notice>}
      <ul className="reg">
        {rows.map((row) => (
          <Row
            key={row.placeId}
            row={row}
            isClosed={isClosed || session.state === 'called-off'}
            isOpen={openRow === row.placeId}
            onOpen={() => setOpenRow(openRow === row.placeId ? null : row.placeId)}
            onPress={(next) => press(row, next)}
          />
        ))}
        {rows.length === 0 && <li className="p-4">Nobody has a place in this session.</li>}
      </ul>
      {session.state === 'planned' && (
        <div className="dock">
          {undo && (
            <div className="undo" role="status">
              <span>{undo.text}</span>
              <button type="button" onClick={takeBack}>
                Undo
              </button>
            </div>
          )}
          <CloseButton
            isClosed={isClosed}
            isBusy={close.isPending}
            marked={marked}
            total={rows.length}
            onPress={() =>
              close.mutate({
                sessionId: session.id,
                revision: register.revision,
                isClosing: !isClosed,
              })
            }
          />
        </div>
      )}
    </>
  )
}

function Row(props: {
  row: RegisterRow
  isClosed: boolean
  isOpen: boolean
  onOpen: () => void
  onPress: (mark: SetMark | null) => void
}) {
  const { row, isClosed, isOpen, onOpen, onPress } = props
  return (
    <li>
      <div className="r">
        <button
          type="button"
          className="mainb"
          disabled={isClosed}
          onClick={() => onPress(row.mark === 'present' ? null : 'present')}
          aria-label={`${row.name}, ${row.mark ? markName(row.mark) : 'not yet marked'}. Press for present.`}
        >
          <span className="mkb">
            <Mark mark={row.mark ?? 'not-yet'} isSilent />
          </span>
          <span className="nmb">
            <b>{row.name}</b>
            <small>
              {[row.note, row.isUnpaid ? 'To pay at the desk' : ''].filter(Boolean).join('. ')}
            </small>
          </span>
        </button>
        <button
          type="button"
          className="oth"
          disabled={isClosed}
          aria-expanded={isOpen}
          aria-label={`${isOpen ? 'Close' : 'Other'} marks for ${row.name}`}
          onClick={onOpen}
        >
          {isOpen ? 'Close' : 'Other'}
        </button>
      </div>
      {isOpen && (
        <div className="pickm" role="group" aria-label={`Mark for ${row.name}`}>
          {MARKS.map((mark) => (
            <button
              key={mark}
              type="button"
              aria-pressed={row.mark === mark}
              onClick={() => onPress(mark)}
            >
              <Mark mark={mark} isSilent />
              {markName(mark)}
            </button>
          ))}
        </div>
      )}
    </li>
  )
}

function CloseButton(props: {
  isClosed: boolean
  isBusy: boolean
  marked: number
  total: number
  onPress: () => void
}) {
  const { isClosed, isBusy, marked, total, onPress } = props
  if (isClosed) {
    return (
      <button type="button" className="btn wide big" disabled={isBusy} onClick={onPress}>
        Open the register again
      </button>
    )
  }
  return (
    <button
      type="button"
      className="btn go wide big"
      disabled={isBusy || marked < total}
      onClick={onPress}
    >
      {isBusy ? 'Closing…' : `Close register, ${marked} of ${total} marked`}
    </button>
  )
}
