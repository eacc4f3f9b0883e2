import { describe, expect, it } from 'vitest'
import { signInWithProvider } from '../../apps/api/src/accounts/accounts'
import { clinicFields, openAcademy, signUp } from '../support/builders'
import { actMeanwhile } from '../support/meanwhile'
import { useWorld } from '../support/use-world'
import { fillClinic, join } from './waitlist/queue'

const world = await useWorld()

describe('two at once', () => {
  it('join the waitlist once by pressing twice', async () => {
    const full = await fillClinic(world, 1)
    const [who] = full.others
    const [one, other] = await Promise.all([join(full, who!), join(full, who!)])
    expect(other).toMatchObject({ status: 200, answer: one.answer })
  })

  it('sign in with the same new identity as the same person', async () => {
    const profile = {
      issuer: 'https://identity.example',
      subject: '2031',
      email: 'new-here@mail.example',
      isEmailVerified: true,
      name: 'Sorcha Lind',
    }
    const signIn = () => signInWithProvider(world.services, profile)
    const [one, other] = await Promise.all([signIn(), signIn()])
    expect(other).toBe(one)
  })

  it('draft clinics of one title at two addresses', async () => {
    const academy = await openAcademy(world)
    const { person } = academy.owner
    const body = { ...clinicFields(academy), title: 'Low and straight' }
    const draft = () => person.must('clinics.draft', { params: { academy: academy.slug }, body })
    const drafts = await Promise.all([draft(), draft()])
    const slugs = drafts.map(({ slug }) => slug)
    expect(slugs.toSorted()).toEqual(['low-and-straight', 'low-and-straight-2'])
  })

  it('take a place and take it away: the capacity is refused in words', async () => {
    const academy = await openAcademy(world)
    const { slug, owner, clinic } = academy
    const params = { academy: slug, clinicId: clinic.id }
    const body = { ...clinicFields(academy), capacity: 1 }
    const { problem } = await actMeanwhile(
      world,
      (trx) => trx('sessions').where({ clinicId: clinic.id }).update({ held: 2 }),
      () => owner.person.call('clinics.change', { params, body }),
    )
    expect(problem).toMatchObject({
      code: 'invalid-fields',
      fields: { capacity: '2 places are taken already.' },
    })
  })

  it('take a place and change the dates: the place is refused in words', async () => {
    const { slug, clinic } = await openAcademy(world)
    const golfer = await signUp(world)
    const { problem } = await actMeanwhile(
      world,
      (trx) => trx('sessions').where({ clinicId: clinic.id }).delete(),
      () =>
        golfer.person.call('enrolments.hold', {
          params: { academy: slug },
          body: { clinicId: clinic.id, for: { kind: 'me' }, hasAcceptedWaiver: true },
        }),
    )
    expect(problem).toMatchObject({ code: 'not-on-sale' })
  })
})
