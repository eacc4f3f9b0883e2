import { useState } from 'react'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { Field, TextArea } from '../ui/field'
import { FormDialog } from '../ui/form-dialog'
import type { Venue } from './area-words'
import { readPosition } from './position'

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
  const { errors, ...dialog } = useForm(
    async () => {
      await keep.mutateAsync(undefined)
      onClose()
    },
    { beside: ['name', 'latitudeDeg', 'longitudeDeg', 'address', 'gettingHere'] },
  )
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
