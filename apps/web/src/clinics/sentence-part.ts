import type { Answer } from '@marram/contract'
import type { Draft } from './draft'

/** What the sentence's words choose from. */
export interface EditorChoices {
  venues: Answer<'venues.list'>['venues']
  coaches: Answer<'coaches.list'>['coaches']
}

/** What every part of a clinic's sentence is given. */
export interface SentencePart extends EditorChoices {
  draft: Draft
  onChange: (change: Partial<Draft>) => void
  /** Whether the clinic was refused for a field of this name. */
  isWrong: (field: string) => boolean
}
