import { InputWord, Sentence } from '../ui/sentence'
import type { Academy } from './queries'

type Tiers = Academy['refundTiers']

/** The refund policy as sentences, from the most notice to the least. */
export function RefundTiers({
  tiers,
  onChange,
}: {
  tiers: Tiers
  onChange: (tiers: Tiers) => void
}) {
  const change = (at: number, part: Partial<Tiers[number]>) =>
    onChange(tiers.map((tier, index) => (index === at ? { ...tier, ...part } : tier)))
  return (
    <fieldset className="mb-4">
      <legend className="lab">When a golfer gives a place up</legend>
      {tiers.map((tier, index) => (
        <Sentence key={index} isSmall>
          With{' '}
          <InputWord
            label={`Hours of notice, step ${index + 1}`}
            type="number"
            min={0}
            max={1440}
            value={String(tier.noticeHours)}
            onChange={(text) => change(index, { noticeHours: Number(text) })}
          />{' '}
          hours’ notice or more,{' '}
          <InputWord
            label={`Share that comes back, step ${index + 1}`}
            type="number"
            min={0}
            max={100}
            value={String(tier.refundBasisPoints / 100)}
            onChange={(text) =>
              change(index, { refundBasisPoints: Math.round(Number(text) * 100) })
            }
          />{' '}
          % comes back.{' '}
          {tiers.length > 1 && (
            <button
              type="button"
              className="linkish"
              onClick={() => onChange(tiers.filter((_, at) => at !== index))}
            >
              Leave out<span className="vh"> step {index + 1}</span>
            </button>
          )}
        </Sentence>
      ))}
      {tiers.length < 6 && (
        <button
          type="button"
          className="linkish"
          onClick={() => onChange([...tiers, { noticeHours: 0, refundBasisPoints: 0 }])}
        >
          Add a step
        </button>
      )}
    </fieldset>
  )
}
