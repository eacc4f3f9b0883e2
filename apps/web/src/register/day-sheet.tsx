import { useEffect, useState } from 'react'
import { makeFormat, type Format } from '../academies/format'
import type { Academy } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { listOf } from '../clinics/list-of'
import { Mark, markName } from '../ui/mark'
import { Notice } from '../ui/notice'
import { CloseRegister } from './close-register'
import { useMarkPlace, type Register, type RegisterRow, type SetMark } from './queries'

const MARKS: readonly SetMark[] = ['present', 'late', 'absent', 'excused']
const UNDO_MS = 10_000

/** A kept mark, with the row as it was before. */
interface Undo {
  row: RegisterRow
  marked: SetMark | null
}

/** One register, for a gloved thumb: a row is present, Other has the four marks. */
export function DaySheet(props: { academy: Academy; date: string; register: Register }) {
  const { academy, date, register } = props
  const { session, rows } = register
  const format = makeFormat({ ...academy, zone: session.zone })
  const mark = useMarkPlace(academy.slug, date)
  const [openRow, setOpenRow] = useState<string | null>(null)
  const [undo, setUndo] = useState<Undo | null>(null)
  const [refusal, setRefusal] = useState<string | null>(null)
  const isClosed = session.registerState === 'closed'

  useEffect(() => {
    if (!undo) return
    const timer = setTimeout(() => setUndo(null), UNDO_MS)
    return () => clearTimeout(timer)
  }, [undo])

  /** Keeps a mark and says how it went: each press for itself, also when another follows it. */
  const keep = async (row: RegisterRow, next: SetMark | null): Promise<boolean> => {
    setOpenRow(null)
    setUndo(null)
    setRefusal(null)
    try {
      await mark.mutateAsync({ sessionId: session.id, placeId: row.placeId, mark: next })
      return true
    } catch (error) {
      setRefusal(`${firstNameOf(row)}’s mark was not kept. ${sentenceOf(error)}`)
      return false
    }
  }
  const press = async (row: RegisterRow, next: SetMark | null) => {
    if (await keep(row, next)) setUndo({ row, marked: next })
  }

  return (
    <>
      <SheetHead session={session} format={format} />
      {session.state === 'called-off' && (
        <Notice drawing="wind">Called off: {session.calledOffReason}. There is no register.</Notice>
      )}
      {refusal && <Notice kind="flag">{refusal}</Notice>}
      <ul className="reg">
        {rows.map((row) => (
          <Row
            key={row.placeId}
            row={row}
            isClosed={isClosed || session.state === 'called-off'}
            isOpen={openRow === row.placeId}
            onOpen={() => setOpenRow(openRow === row.placeId ? null : row.placeId)}
            onPress={(next) => void press(row, next)}
          />
        ))}
        {rows.length === 0 && <li className="p-4">Nobody has a place in this session.</li>}
      </ul>
      {session.state === 'planned' && (
        <div className="dock">
          {undo && <UndoLine undo={undo} onUndo={() => void keep(undo.row, undo.row.mark)} />}
          <CloseRegister academy={academy.slug} register={register} />
        </div>
      )}
    </>
  )
}

function SheetHead({ session, format }: { session: Register['session']; format: Format }) {
  const isClosed = session.registerState === 'closed'
  return (
    <div className="p-4">
      <h2>{session.clinicTitle}</h2>
      <p>
        {listOf(session.areas.map(({ name }) => name))}, until {format.time(session.endsAt)}.
        <br />
        {isClosed ? 'The register is closed. ' : 'Press a name for present. '}
        {session.duskAt && (
          <b className="haartext">
            {format.dusk.word} {format.time(session.duskAt)}
          </b>
        )}
      </p>
    </div>
  )
}

const firstNameOf = ({ name }: RegisterRow): string => name.split(' ')[0] ?? name

/** The last thing done, and the way back from it. */
function UndoLine({ undo, onUndo }: { undo: Undo; onUndo: () => void }) {
  const first = firstNameOf(undo.row)
  return (
    <div className="undo" role="status">
      <span>
        {undo.marked
          ? `${first} is marked ${markName(undo.marked).toLowerCase()}`
          : `${first}’s mark is gone`}
      </span>
      <button type="button" onClick={onUndo}>
        Undo
      </button>
    </div>
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
          aria-label={`${row.name}, ${row.mark ? markName(row.mark) : 'not yet marked'}. ${row.mark === 'present' ? 'Press to take the mark away.' : 'Press for present.'}`}
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
