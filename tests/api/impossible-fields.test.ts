import { expect, it } from 'vitest'
import { clinicFields, openAcademy, signUp } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()
const academy = await openAcademy(world)
const params = { academy: academy.slug }

it.each([
  [{ ageMin: 18, ageMax: 5 }, 'ageMax'],
  [{ handicapMin: 30, handicapMax: 5 }, 'handicapMax'],
])('refuses a clinic that is for nobody: %j', async (change, field) => {
  const body = { ...clinicFields(academy), ...change }
  const reply = await academy.owner.person.call('clinics.draft', { params, body })
  expect(reply.problem?.fields).toHaveProperty(field)
})

it('refuses a child who is still to be born', async () => {
  const guardian = await signUp(world)
  const body = {
    name: 'Oona Tarrant',
    bornOn: '2031-03-04',
    handicap: null,
    emergencyContact: { name: 'Bríd Tarrant', phone: '+353 1 555 0100' },
    hasConsent: true,
  } as const
  const reply = await guardian.person.call('golfers.add-dependant', { params, body })
  expect(reply.problem?.fields).toHaveProperty('bornOn')
  const today = { ...body, bornOn: '2031-03-03' }
  await guardian.person.must('golfers.add-dependant', { params, body: today })
})

it('refuses a golfer at the desk who is still to be born', async () => {
  const { person } = academy.owner
  const born = (bornOn: string) =>
    person.call('golfers.enter', { params, body: { name: 'Oona Tarrant', bornOn } })
  expect((await born('2031-03-04')).problem?.fields).toHaveProperty('bornOn')
  expect((await born('2031-03-03')).status).toBe(200)
})

it('answers a file that is not there as one that is not there, and keeps no refusal', async () => {
  const missing = await fetch(`${world.url}/api/nothing`)
  expect(missing.status).toBe(404)
  expect(missing.headers.get('cache-control')).toBe('no-store')
})
