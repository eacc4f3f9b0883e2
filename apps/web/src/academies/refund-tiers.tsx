import { InputWord, Sentence } from '../ui/sentence'
import type { Academy } from './queries'

type Tiers = Academy['refundTiers']

/** The refund policy as sentences, from the most notice to the least. */
export function RefundTiers({
  tiers,
  onChange,
  errors,
}: {
  tiers: Tiers
  onChange: (tiers: Tiers) => void
  /** Sentences by path, like `refundTiers.0.noticeHours`. */
  errors: Readonly<Record<string, string>>
}) {
  const wrong = wrongParts(errors)
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
            isWrong={wrong.has(`${index}.noticeHours`)}
            value={String(tier.noticeHours)}
            onChange={(text) => change(index, { noticeHours: Number(text) })}
          />{' '}
          hours’ notice or more,{' '}
          <InputWord
            label={`Share that comes back, step ${index + 1}`}
            type="number"
            min={0}
            max={100}
            isWrong={wrong.has(`${index}.refundBasisPoints`)}
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
      {[...wrong].map(([part, sentence]) => (
        <p key={part} className="flagtext">
          {sentence}
        </p>
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

const SENTENCES: Readonly<Record<string, (step: string) => string>> = {
  noticeHours: (step) => `Step ${step}: notice is 0 to 1440 whole hours.`,
  refundBasisPoints: (step) => `Step ${step}: the share that comes back is 0 to 100 %.`,
}

/**
 * What is wrong with the steps, by step and part ("0.noticeHours"). Written here, because the API
 * counts the share in hundredths of a per cent, which nobody typed.
 */
export function wrongParts(errors: Readonly<Record<string, string>>): Map<string, string> {
  const parts = new Map<string, string>()
  for (const [path, sentence] of Object.entries(errors)) {
    const [field, index, part] = path.split('.')
    if (field !== 'refundTiers') continue
    const own = part === undefined ? undefined : SENTENCES[part]
    const text = own && index !== undefined ? own(String(Number(index) + 1)) : sentence
    parts.set(path.slice(field.length + 1), text)
  }
  return parts
}
