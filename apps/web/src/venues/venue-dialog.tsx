import { useState } from 'react'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { ApiProblem } from '../api/problem'
import { Field, TextArea } from '../ui/field'
import { FormDialog } from '../ui/form-dialog'
import { readDegrees, type Venue } from './area-words'

/** A venue's name and where it lies. */
export function VenueDialog(props: { slug: string; venue: Venue | null; onClose: () => void }) {
  const { slug, venue, onClose } = props
  const [wanted, setWanted] = useState({
    name: venue?.name ?? '',
    latitude: venue ? String(venue.latitudeDeg) : '',
    longitude: venue ? String(venue.longitudeDeg) : '',
    address: venue?.address ?? '',
    gettingHere: venue?.gettingHere ?? '',
  })
  const set = (change: Partial<typeof wanted>) => setWanted((had) => ({ ...had, ...change }))
  const keep = useAcademyMutation(slug, () => {
    const body = {
      name: wanted.name,
      address: wanted.address,
      gettingHere: wanted.gettingHere,
      ...readPosition(wanted),
    }
    return venue
      ? call('venues.change', { academy: slug, params: { venueId: venue.id }, body })
      : call('venues.add', { academy: slug, body })
  })
  const { errors, ...dialog } = useForm(async () => {
    await keep.mutateAsync(undefined)
    onClose()
  })
  return (
    <FormDialog
      {...dialog}
      title={venue ? `Change ${venue.name}` : 'New venue'}
      action="Save venue"
      onClose={onClose}
    >
      <Field
        label="Name"
        value={wanted.name}
        onChange={(event) => set({ name: event.target.value })}
        error={errors['name']}
      />
      <div className="f two">
        <Field
          label="Degrees north"
          inputMode="decimal"
          hint="South is minus."
          value={wanted.latitude}
          onChange={(event) => set({ latitude: event.target.value })}
          error={errors['latitudeDeg']}
        />
        <Field
          label="Degrees east"
          inputMode="decimal"
          hint="West is minus."
          value={wanted.longitude}
          onChange={(event) => set({ longitude: event.target.value })}
          error={errors['longitudeDeg']}
        />
      </div>
      <TextArea
        label="Address"
        rows={2}
        value={wanted.address}
        onChange={(event) => set({ address: event.target.value })}
        error={errors['address']}
      />
      <TextArea
        label="Getting here"
        rows={2}
        value={wanted.gettingHere}
        onChange={(event) => set({ gettingHere: event.target.value })}
        error={errors['gettingHere']}
      />
    </FormDialog>
  )
}

function readPosition(wanted: { latitude: string; longitude: string }) {
  const latitudeDeg = readDegrees(wanted.latitude)
  const longitudeDeg = readDegrees(wanted.longitude)
  if (latitudeDeg !== null && longitudeDeg !== null) return { latitudeDeg, longitudeDeg }
  const sentence = 'Degrees as a number, like 53.8512.'
  throw new ApiProblem({
    code: 'invalid-fields',
    status: 422,
    detail: 'Sunset needs the place in degrees.',
    fields: {
      ...(latitudeDeg === null ? { latitudeDeg: sentence } : {}),
      ...(longitudeDeg === null ? { longitudeDeg: sentence } : {}),
    },
  })
}
