import type { Sent } from '@marram/contract'
import { CheckField, Field } from '../ui/field'

export interface DependantDraft {
  name: string
  bornOn: string
  handicap: string
  contactName: string
  contactPhone: string
  hasConsent: boolean
}

export const EMPTY_DEPENDANT: DependantDraft = {
  name: '',
  bornOn: '',
  handicap: '',
  contactName: '',
  contactPhone: '',
  hasConsent: false,
}

/** The fields that say beside themselves what is wrong. */
export const DEPENDANT_FIELDS = ['name', 'bornOn', 'handicap', 'emergencyContact', 'hasConsent']

/** What is sent; the API says in words what is missing. */
export function toDependant(draft: DependantDraft): Sent<'golfers.add-dependant', 'body'> {
  return {
    name: draft.name,
    bornOn: draft.bornOn,
    handicap: draft.handicap.trim() === '' ? null : Number(draft.handicap.replace(',', '.')),
    emergencyContact: { name: draft.contactName, phone: draft.contactPhone },
    // The API says the sentence when this is not so.
    hasConsent: draft.hasConsent as true,
  }
}

/** Somebody looked after: name, date of birth, who to call, and the guardian's consent. */
export function DependantFields(props: {
  draft: DependantDraft
  onChange: (draft: DependantDraft) => void
  errors: Readonly<Record<string, string>>
  prefix: string
  safeguarding: string
}) {
  const { draft, onChange, errors, prefix } = props
  const set = (change: Partial<DependantDraft>) => onChange({ ...draft, ...change })
  const error = (name: string) => errors[`${prefix}${name}`]
  return (
    <div className="mb-4">
      <Field
        label="Their name"
        autoComplete="off"
        value={draft.name}
        onChange={(event) => set({ name: event.target.value })}
        error={error('name')}
      />
      <div className="f two">
        <Field
          label="Date of birth"
          type="date"
          value={draft.bornOn}
          onChange={(event) => set({ bornOn: event.target.value })}
          error={error('bornOn')}
        />
        <Field
          label="Handicap"
          hint="If they have one"
          inputMode="decimal"
          value={draft.handicap}
          onChange={(event) => set({ handicap: event.target.value })}
          error={error('handicap')}
        />
      </div>
      <div className="f two">
        <Field
          label="Who to call"
          autoComplete="off"
          value={draft.contactName}
          onChange={(event) => set({ contactName: event.target.value })}
          error={error('emergencyContact.name')}
        />
        <Field
          label="Telephone"
          type="tel"
          value={draft.contactPhone}
          onChange={(event) => set({ contactPhone: event.target.value })}
          error={error('emergencyContact.phone')}
        />
      </div>
      <p className="note soft">{props.safeguarding}</p>
      <CheckField
        label="I am their guardian and agree to them taking part."
        isChecked={draft.hasConsent}
        onChange={(hasConsent) => set({ hasConsent })}
        error={error('hasConsent')}
      />
    </div>
  )
}
