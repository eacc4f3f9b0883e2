import { expect, it } from 'vitest'
import { openAcademy, secretMailedTo, signUp } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('leaves a coach to whoever took up the first of two invitations', async () => {
  const { slug, owner, coach } = await openAcademy(world)
  const params = { academy: slug }
  const people = [await signUp(world), await signUp(world)] as const
  for (const { account } of people) {
    const body = { email: account.email, role: 'coach', coachId: coach.id } as const
    await owner.person.must('invitations.send', { params, body })
  }
  await world.drain()
  for (const { account, person } of people) {
    const token = secretMailedTo(world, account.email, 'invitation')
    await person.must('invitations.accept', { body: { token } })
  }
  const { coaches } = await owner.person.must('coaches.list', { params })
  const [first, second] = people
  expect(coaches.find(({ id }) => id === coach.id)?.accountId).toBe(first.account.id)
  expect(coaches.some(({ accountId }) => accountId === second.account.id)).toBe(true)
})
