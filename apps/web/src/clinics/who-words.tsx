import { InputWord, SelectWord } from '../ui/sentence'
import { levelChosen, type LevelWords } from './level-words'
import type { SentencePart } from './sentence-part'

const LEVELS: { value: LevelWords['level']; label: string }[] = [
  { value: 'any', label: 'any age and level' },
  { value: 'adults', label: 'adult age' },
  { value: 'juniors', label: 'junior age' },
  { value: 'handicap', label: 'a handicap' },
  { value: 'both', label: 'an age' },
]

/** "6 golfers of junior age from 7 to 10". */
export function WhoWords({ draft, onChange, isWrong }: SentencePart) {
  const kind = draft.level === 'handicap' ? 'handicap' : 'age'
  return (
    <>
      <InputWord
        label="How many golfers"
        type="number"
        min={1}
        max={200}
        value={draft.capacity}
        onChange={(capacity) => onChange({ capacity })}
        isWrong={isWrong('capacity')}
      />{' '}
      golfers of{' '}
      <SelectWord
        label="Level"
        value={draft.level}
        onChange={(level) => onChange(levelChosen(level))}
        // Both together are read where they were saved; the sentence offers one of them.
        options={LEVELS.filter(({ value }) => value !== 'both' || draft.level === 'both')}
      />
      {draft.level !== 'any' && (
        <>
          {' '}
          from{' '}
          <InputWord
            label="From"
            type="number"
            value={draft.from}
            onChange={(from) => onChange({ from })}
            isWrong={isWrong(`${kind}Min`)}
          />{' '}
          to{' '}
          <InputWord
            label="To"
            type="number"
            value={draft.to}
            onChange={(to) => onChange({ to })}
            isWrong={isWrong(`${kind}Max`)}
          />
        </>
      )}
      {draft.level === 'both' && (
        <>
          {' '}
          and a handicap from{' '}
          <InputWord
            label="Handicap from"
            type="number"
            value={draft.handicapFrom}
            onChange={(handicapFrom) => onChange({ handicapFrom })}
            isWrong={isWrong('handicapMin')}
          />{' '}
          to{' '}
          <InputWord
            label="Handicap to"
            type="number"
            value={draft.handicapTo}
            onChange={(handicapTo) => onChange({ handicapTo })}
            isWrong={isWrong('handicapMax')}
          />
        </>
      )}
    </>
  )
}
