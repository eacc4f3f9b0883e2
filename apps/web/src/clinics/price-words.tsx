import { InputWord, SelectWord } from '../ui/sentence'
import type { Draft } from './draft'
import type { SentencePart } from './sentence-part'

const PAY_MODES: { value: Draft['payMode']; label: string }[] = [
  { value: 'card', label: 'Paid by card' },
  { value: 'desk', label: 'Paid at the desk' },
  { value: 'free', label: 'Free' },
]

const SALE_MODES: { value: Draft['saleMode']; label: string }[] = [
  { value: 'run', label: 'as a whole run' },
  { value: 'drop-in', label: 'session by session' },
  { value: 'both', label: 'either way' },
]

/** "Paid by card, sold as a whole run at 108.00 for the run". */
export function PriceWords({ draft, onChange, isWrong }: SentencePart) {
  const isPaid = draft.payMode !== 'free'
  return (
    <>
      <SelectWord
        label="Payment"
        value={draft.payMode}
        onChange={(payMode) => onChange({ payMode })}
        options={PAY_MODES}
      />
      , sold{' '}
      <SelectWord
        label="How it is sold"
        value={draft.saleMode}
        onChange={(saleMode) => onChange({ saleMode })}
        options={SALE_MODES}
      />
      {isPaid && draft.saleMode !== 'drop-in' && (
        <>
          {' '}
          at{' '}
          <InputWord
            label="Price of the run"
            value={draft.runPrice}
            placeholder="108.00"
            inputMode="decimal"
            onChange={(runPrice) => onChange({ runPrice })}
            isWrong={draft.runPrice === '' || isWrong('runPriceMinor')}
          />{' '}
          for the run
        </>
      )}
      {isPaid && draft.saleMode !== 'run' && (
        <>
          {' '}
          at{' '}
          <InputWord
            label="Price of one session"
            value={draft.dropInPrice}
            placeholder="18.00"
            inputMode="decimal"
            onChange={(dropInPrice) => onChange({ dropInPrice })}
            isWrong={draft.dropInPrice === '' || isWrong('dropInPriceMinor')}
          />{' '}
          a session
        </>
      )}
    </>
  )
}
