import { expect, it } from 'vitest'
import { asSuperuser } from '../support/books'
import { openAcademy, signUp } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld({ begins: new Date('2031-03-30T23:30:00.000Z') })

it('dates a handicap by the day where the academy is, whoever gives it', async () => {
  const academy = await openAcademy(world)
  const params = { academy: academy.slug }
  const { person: owner } = academy.owner
  const { person: golfer } = await signUp(world)
  const handicap = 18.4
  await owner.must('golfers.enter', { params, body: { name: 'Entered', handicap } })
  const { id: golferId } = await owner.must('golfers.enter', { params, body: { name: 'Changed' } })
  await owner.must('golfers.change', { params: { ...params, golferId }, body: { handicap } })
  const hold = { clinicId: academy.clinic.id, hasAcceptedWaiver: true } as const
  await golfer.must('enrolments.hold', { params, body: { ...hold, for: { kind: 'me', handicap } } })
  await golfer.must('golfers.add-dependant', {
    params,
    body: {
      name: 'Oona Tarrant',
      bornOn: '2020-05-02',
      handicap,
      emergencyContact: { name: 'Bríd Tarrant', phone: '+353 1 555 0100' },
      hasConsent: true,
    },
  })

  // Half an hour after midnight, on the first day of summer time.
  const days = await asSuperuser(world, (db) => db('golfers').orderBy('createdAt'))
  const TODAY = '2031-03-31'
  expect(days.map(({ handicapOn }) => String(handicapOn))).toEqual([TODAY, TODAY, TODAY, TODAY])
})
