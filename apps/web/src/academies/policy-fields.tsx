import { CheckField, Field, SelectField, TextArea } from '../ui/field'
import type { Academy } from './queries'

/** What of an academy its policies are. */
export function policiesOf(academy: Academy) {
  const { taxMode, taxName, taxBasisPoints, refundTiers, waiver, safeguarding } = academy
  const { holdMinutes, offerHours, duskKind, owedDefault, canPayAtDesk } = academy
  return {
    ...{ taxMode, taxName, taxBasisPoints, refundTiers, waiver, safeguarding },
    ...{ holdMinutes, offerHours, duskKind, owedDefault, canPayAtDesk },
  }
}

export type Policies = ReturnType<typeof policiesOf>

interface FieldsProps {
  wanted: Policies
  set: (change: Partial<Policies>) => void
  errors: Readonly<Record<string, string>>
}

/** How tax is added, what it is called and how much it is. */
export function TaxFields({ wanted, set, errors }: FieldsProps) {
  return (
    <>
      <SelectField
        label="Tax"
        value={wanted.taxMode}
        options={[
          { value: 'included', label: 'In the price' },
          { value: 'added', label: 'Added on top' },
        ]}
        onChange={(taxMode) => set({ taxMode })}
      />
      <div className="f two">
        <Field
          label="What it is called"
          value={wanted.taxName}
          onChange={(event) => set({ taxName: event.target.value })}
          error={errors['taxName']}
        />
        <Field
          label="Rate in per cent"
          type="number"
          min={0}
          max={50}
          step={0.01}
          hint="Please check it with whoever does your books."
          value={wanted.taxBasisPoints / 100}
          onChange={(event) =>
            set({ taxBasisPoints: Math.round(Number(event.target.value) * 100) })
          }
          error={errors['taxBasisPoints']}
        />
      </div>
    </>
  )
}

/** What becomes of a session that was called off, and whether the desk takes money. */
export function OwedFields({ wanted, set }: FieldsProps) {
  return (
    <>
      <SelectField
        label="When we call a session off and the golfer does not choose"
        value={wanted.owedDefault}
        options={[
          { value: 'credit', label: 'Credit after seven days' },
          { value: 'money', label: 'Money back after seven days' },
        ]}
        onChange={(owedDefault) => set({ owedDefault })}
      />
      <CheckField
        label="Golfers may pay at the desk"
        isChecked={wanted.canPayAtDesk}
        onChange={(canPayAtDesk) => set({ canPayAtDesk })}
      />
    </>
  )
}

/** How long a place is held or offered, and when an evening ends. */
export function TimeFields({ wanted, set, errors }: FieldsProps) {
  return (
    <>
      <div className="f two">
        <Field
          label="A place is held for"
          hint="Minutes, while payment is made."
          type="number"
          min={5}
          max={60}
          value={wanted.holdMinutes}
          onChange={(event) => set({ holdMinutes: Number(event.target.value) })}
          error={errors['holdMinutes']}
        />
        <Field
          label="An offer stands for"
          hint="Hours, for who waits."
          type="number"
          min={1}
          max={72}
          value={wanted.offerHours}
          onChange={(event) => set({ offerHours: Number(event.target.value) })}
          error={errors['offerHours']}
        />
      </div>
      <SelectField
        label="Evenings end at"
        value={wanted.duskKind}
        options={[
          { value: 'sunset', label: 'Sunset' },
          { value: 'civil', label: 'The end of civil twilight' },
        ]}
        onChange={(duskKind) => set({ duskKind })}
      />
    </>
  )
}

/** What golfers and guardians read before they agree. */
export function WordingFields({ wanted, set, errors }: FieldsProps) {
  return (
    <>
      <TextArea
        label="What golfers accept"
        rows={5}
        value={wanted.waiver}
        onChange={(event) => set({ waiver: event.target.value })}
        error={errors['waiver']}
      />
      <TextArea
        label="Safeguarding, shown where a child is enrolled"
        rows={5}
        value={wanted.safeguarding}
        onChange={(event) => set({ safeguarding: event.target.value })}
        error={errors['safeguarding']}
      />
    </>
  )
}
