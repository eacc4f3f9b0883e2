import { sentenceOf } from '../api/problem'
import { Notice } from '../ui/notice'
import { useCloseRegister, type Register } from './queries'

/** Closes a register once everybody is marked, and opens it again. */
export function CloseRegister({ academy, register }: { academy: string; register: Register }) {
  const { session, rows, revision } = register
  const close = useCloseRegister(academy)
  const isClosed = session.registerState === 'closed'
  const unmarked = rows.filter(({ mark }) => mark === null).length
  const press = () => close.mutate({ sessionId: session.id, revision, isClosing: !isClosed })
  if (isClosed) {
    return (
      <>
        {close.error && <Notice kind="flag">{sentenceOf(close.error)}</Notice>}
        <button type="button" className="btn wide big" disabled={close.isPending} onClick={press}>
          Open the register again
        </button>
      </>
    )
  }
  return (
    <>
      {close.error && <Notice kind="flag">{sentenceOf(close.error)}</Notice>}
      {unmarked > 0 && (
        <p className="why" id="why-open">
          {unmarked === 1 ? 'One golfer has' : `${unmarked} golfers have`} no mark yet.
        </p>
      )}
      <button
        type="button"
        className="btn go wide big"
        disabled={close.isPending || unmarked > 0}
        aria-describedby={unmarked > 0 ? 'why-open' : undefined}
        onClick={press}
      >
        {close.isPending
          ? 'Closing…'
          : `Close register, ${rows.length - unmarked} of ${rows.length} marked`}
      </button>
    </>
  )
}
