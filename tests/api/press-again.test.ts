import { expect, it } from 'vitest'
import { openAcademy, signUp } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

const OONA = {
  name: 'Oona Tarrant',
  bornOn: '2020-05-02',
  handicap: null,
  emergencyContact: { name: 'Bríd Tarrant', phone: '+353 1 555 0100' },
  hasConsent: true,
} as const

it('holds one place for a child whose form is sent twice', async () => {
  const academy = await openAcademy(world)
  const params = { academy: academy.slug }
  const guardian = await signUp(world)
  const body = {
    clinicId: academy.clinic.id,
    for: { kind: 'new', dependant: OONA },
    hasAcceptedWaiver: true,
  } as const

  const first = await guardian.person.must('enrolments.hold', { params, body })
  const again = await guardian.person.must('enrolments.hold', { params, body })

  expect(again.id).toBe(first.id)
  expect((await guardian.person.must('golfers.mine', { params })).golfers).toHaveLength(1)
})

it('adds one child whose form is sent twice at once', async () => {
  const academy = await openAcademy(world)
  const params = { academy: academy.slug }
  const { person } = await signUp(world)
  const add = () => person.must('golfers.add-dependant', { params, body: OONA })

  const [one, other] = await Promise.all([add(), add()])

  expect(other).toEqual(one)
  expect((await person.must('golfers.mine', { params })).golfers).toEqual([one])
})

it('refuses a NUL in an address and in a search', async () => {
  const { slug, owner } = await openAcademy(world)
  expect((await owner.person.send('GET', '/api/academies/%00/page')).status).toBe(404)
  const search = await owner.person.send('GET', `/api/academies/${slug}/golfers?search=%00`)
  expect(search.status).toBe(422)
})
