import { Sentence } from '../ui/sentence'
import { hasUnsaidRule } from './draft'
import { PriceWords } from './price-words'
import type { SentencePart } from './sentence-part'
import { WhenWords } from './when-words'
import { WhereWords } from './where-words'
import { WhoWords } from './who-words'

/** A clinic written as a sentence: every green word can be changed in place. */
export function ClinicSentence(props: SentencePart) {
  return (
    <>
      <Sentence>
        <WhenWords {...props} />. At <WhereWords {...props} />. For <WhoWords {...props} />.{' '}
        <PriceWords {...props} />.
      </Sentence>
      {hasUnsaidRule(props.draft) && (
        <p className="hint">
          Its days follow a rule that this sentence has no words for; they stay as they are.
        </p>
      )}
    </>
  )
}
