import { beforeAll, expect, it } from 'vitest'
import { openAcademy, secretMailedTo, signUp, type OpenAcademy } from '../support/builders'
import { actMeanwhile } from '../support/meanwhile'
import { useWorld } from '../support/use-world'

const world = await useWorld()
let academy: OpenAcademy

beforeAll(async () => {
  academy = await openAcademy(world)
})

const owner = () => academy.owner.person
const inHere = (params: Record<string, string> = {}) => ({
  params: { academy: academy.slug, ...params },
})
const invite = (email: string) =>
  owner().must('invitations.send', { ...inHere(), body: { email, role: 'desk' } })
const openInvitations = async () =>
  (await owner().must('staff.list', inHere())).invitations.map(({ id }) => id)

it('closes the link of an invitation that is withdrawn, and takes it off the list', async () => {
  const { account, person } = await signUp(world)
  const { id } = await invite(account.email)
  await world.drain()
  const body = { token: secretMailedTo(world, account.email, 'invitation') }
  expect(await openInvitations()).toContain(id)

  await owner().must('invitations.withdraw', inHere({ invitationId: id }))

  expect(await openInvitations()).not.toContain(id)
  expect((await person.call('invitations.read', { body })).problem?.code).toBe('link-not-valid')
  expect((await person.call('invitations.accept', { body })).problem?.code).toBe('link-not-valid')
})

it('sends no mail for one that is withdrawn before it was written', async () => {
  const { account } = await signUp(world)
  const { id } = await invite(account.email)
  await owner().must('invitations.withdraw', inHere({ invitationId: id }))
  await world.drain()
  expect(() => secretMailedTo(world, account.email, 'invitation')).toThrow()
})

it('finds none to withdraw twice, or once it was taken up', async () => {
  const { account, person } = await signUp(world)
  const first = await invite(account.email)
  await owner().must('invitations.withdraw', inHere({ invitationId: first.id }))
  const again = await owner().call('invitations.withdraw', inHere({ invitationId: first.id }))
  expect(again.problem?.code).toBe('not-found')

  const second = await invite(account.email)
  await world.drain()
  const token = secretMailedTo(world, account.email, 'invitation')
  await person.must('invitations.accept', { body: { token } })
  const late = await owner().call('invitations.withdraw', inHere({ invitationId: second.id }))
  expect(late.problem?.code).toBe('not-found')
  expect((await owner().must('staff.list', inHere())).staff.map(({ email }) => email)).toContain(
    account.email,
  )
})

it('lets nobody in who presses while it is being withdrawn', async () => {
  const { account, person } = await signUp(world)
  const { id } = await invite(account.email)
  await world.drain()
  const token = secretMailedTo(world, account.email, 'invitation')
  const justBefore = new Date(world.clock.now().getTime() - 1)
  const { problem } = await actMeanwhile(
    world,
    (trx) => trx('invitations').where({ id }).update({ expiresAt: justBefore }),
    () => person.call('invitations.accept', { body: { token } }),
  )
  expect(problem?.code).toBe('link-not-valid')
})
