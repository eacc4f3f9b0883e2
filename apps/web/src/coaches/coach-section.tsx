import { useState } from 'react'
import type { Answer } from '@marram/contract'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { useAcademyMutation } from '../api/mutation'
import { Button } from '../ui/button'
import { Field, TextArea } from '../ui/field'
import { Initials } from '../ui/initials'
import { FormDialog } from '../ui/form-dialog'
import { toast } from '../ui/toast'

type Coach = Answer<'coaches.list'>['coaches'][number]

/** Who teaches here. */
export function CoachSection(props: {
  slug: string
  coaches: readonly Coach[]
  mayChange: boolean
}) {
  const { slug, coaches, mayChange } = props
  const [chosen, setChosen] = useState<Coach | 'new' | null>(null)
  return (
    <section aria-labelledby="coaches">
      <div className="sect">
        <h2 id="coaches">Coaches</h2>
        {mayChange && <Button onClick={() => setChosen('new')}>New coach</Button>}
      </div>
      <ul className="reg mb-5">
        {coaches.map((coach) => (
          <li key={coach.id} className="waitrow">
            <span className="flex items-center gap-3">
              <Initials of={coach.initials} />
              <span>
                <b>{coach.name}</b>
                <br />
                <span className="soft">
                  {coach.accountId ? 'Signs in' : 'Has no sign-in yet'}
                  {coach.about && ` · ${coach.about}`}
                </span>
              </span>
            </span>
            {mayChange && (
              <button type="button" className="linkish" onClick={() => setChosen(coach)}>
                Change<span className="vh"> {coach.name}</span>
              </button>
            )}
          </li>
        ))}
        {coaches.length === 0 && <li className="waitrow">Nobody yet. A clinic needs a coach.</li>}
      </ul>
      {chosen && (
        <CoachDialog
          slug={slug}
          coach={chosen === 'new' ? null : chosen}
          onClose={() => setChosen(null)}
        />
      )}
    </section>
  )
}

const SHOWN = ['name', 'initials', 'about', 'invite', 'email']

function CoachDialog(props: { slug: string; coach: Coach | null; onClose: () => void }) {
  const { slug, coach, onClose } = props
  const [wanted, setWanted] = useState({
    name: coach?.name ?? '',
    initials: coach?.initials ?? '',
    about: coach?.about ?? '',
    invite: '',
  })
  const set = (change: Partial<typeof wanted>) => setWanted((had) => ({ ...had, ...change }))
  const keep = useAcademyMutation(slug, async () => {
    const { name, initials, about, invite } = wanted
    const body = { name, about, ...(initials ? { initials } : {}) }
    if (!coach) {
      return call('coaches.add', {
        academy: slug,
        body: { ...body, ...(invite ? { invite } : {}) },
      })
    }
    const changed = await call('coaches.change', {
      academy: slug,
      params: { coachId: coach.id },
      body,
    })
    if (invite) {
      const invitation = { email: invite, role: 'coach', coachId: coach.id } as const
      await call('invitations.send', { academy: slug, body: invitation })
    }
    return changed
  })
  const { errors, ...dialog } = useForm(
    async () => {
      await keep.mutateAsync(undefined)
      if (wanted.invite) toast(`${wanted.invite} gets a mail with an invitation.`)
      onClose()
    },
    { beside: coach?.accountId ? ['name', 'initials', 'about'] : SHOWN },
  )
  return (
    <FormDialog
      {...dialog}
      title={coach ? `Change ${coach.name}` : 'New coach'}
      action="Save coach"
      onClose={onClose}
    >
      <Field
        label="Name"
        value={wanted.name}
        onChange={(event) => set({ name: event.target.value })}
        error={errors['name']}
      />
      <Field
        label="Initials"
        hint="Up to three capital letters, for the week board. Left empty, the name’s own."
        value={wanted.initials}
        onChange={(event) => set({ initials: event.target.value.toUpperCase() })}
        error={errors['initials']}
      />
      <TextArea
        label="About them"
        rows={2}
        value={wanted.about}
        onChange={(event) => set({ about: event.target.value })}
        error={errors['about']}
      />
      {!coach?.accountId && (
        <Field
          label="E-mail"
          type="email"
          hint="An invitation goes there, so that they can take the register. It can wait."
          value={wanted.invite}
          onChange={(event) => set({ invite: event.target.value })}
          error={errors['invite'] ?? errors['email']}
        />
      )}
    </FormDialog>
  )
}
