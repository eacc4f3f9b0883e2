import { useState } from 'react'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { CheckField, Field, SelectField } from '../ui/field'
import { FormDialog } from '../ui/form-dialog'
import { AREA_KINDS, usualArea, type Area, type AreaBody } from './area-words'

/** A part of a venue: what it is, how many bays, and whether it can be used in the dark or the wet. */
export function AreaDialog(props: {
  slug: string
  venueId: string
  area: Area | null
  onClose: () => void
}) {
  const { slug, venueId, area, onClose } = props
  const [wanted, setWanted] = useState<AreaBody>(() => (area ? bodyOf(area) : usualArea('range')))
  const set = (change: Partial<AreaBody>) => setWanted((had) => ({ ...had, ...change }))
  const keep = useAcademyMutation(slug, () =>
    area
      ? call('areas.change', { academy: slug, params: { areaId: area.id }, body: wanted })
      : call('areas.add', { academy: slug, params: { venueId }, body: wanted }),
  )
  const { errors, ...dialog } = useForm(
    async () => {
      await keep.mutateAsync(undefined)
      onClose()
    },
    { beside: ['name', 'units'] },
  )
  return (
    <FormDialog
      {...dialog}
      title={area ? `Change ${area.name}` : 'New area'}
      action="Save area"
      onClose={onClose}
    >
      <SelectField
        label="What it is"
        value={wanted.kind}
        options={AREA_KINDS}
        onChange={(kind) => setWanted(usualArea(kind))}
      />
      <Field
        label="Name"
        value={wanted.name}
        onChange={(event) => set({ name: event.target.value })}
        error={errors['name']}
      />
      <Field
        label="Bays, mats or holes"
        type="number"
        min={1}
        max={200}
        value={wanted.units}
        onChange={(event) => set({ units: Number(event.target.value) })}
        error={errors['units']}
      />
      <CheckField
        label="It has lamps"
        isChecked={wanted.hasLamps}
        onChange={(hasLamps) => set({ hasLamps })}
      />
      <CheckField
        label="It is covered"
        isChecked={wanted.isCovered}
        onChange={(isCovered) => set({ isCovered })}
      />
    </FormDialog>
  )
}

function bodyOf({ name, kind, units, hasLamps, isCovered }: Area): AreaBody {
  return { name, kind, units, hasLamps, isCovered }
}
