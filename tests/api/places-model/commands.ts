import type { RouteKey } from '@marram/contract'
import type fc from 'fast-check'
import { expect } from 'vitest'
import type { EnrolmentView, SignedUp } from '../../support/builders'
import type { Person, Reply } from '../../support/person'
import { checkLaws } from './laws'
import type { Remembered } from './remembered'
import type { Scene } from './scene'
import { takeStock } from './stock'

export type Step = fc.AsyncCommand<Remembered, Scene>

/** What somebody does, told in words when a run fails. The laws are checked after each. */
export function step(
  words: string,
  act: (scene: Scene, remembered: Remembered) => Promise<void>,
): Step {
  return {
    // Everything may be tried at any time: what cannot be done is refused in words.
    check: () => true,
    async run(remembered, scene) {
      await act(scene, remembered)
      await scene.world.drain()
      await checkLaws(scene, remembered)
    },
    toString: () => words,
  }
}

/** Whether it went well; otherwise it was refused for one of the reasons there are. */
export function wentWell(key: RouteKey, reply: Reply<unknown>): boolean {
  if (reply.status < 400) return true
  const code = reply.problem?.code ?? 'unexpected'
  expect(EXPECTED_REFUSALS, `${key}: ${reply.text}`).toContain(code)
  return false
}

const EXPECTED_REFUSALS = [
  'session-full',
  'already-has-place',
  'hold-lapsed',
  'not-on-sale',
  'already-decided',
  'not-found',
]

export async function enrolmentsOf(scene: Scene, golfer: SignedUp): Promise<EnrolmentView[]> {
  const { params } = scene
  const reply = await golfer.person.call('enrolments.mine', { params })
  // Who never took a place here is nobody here.
  return reply.status < 400 ? reply.answer.enrolments : []
}

/** One of the enrolments in a state, with whoever took it; null where there is none. */
export async function pickEnrolment(
  scene: Scene,
  { state, pick }: { state: EnrolmentView['state']; pick: number },
): Promise<{ person: Person; enrolment: EnrolmentView } | null> {
  const found = (await takeStock(scene)).enrolments.filter((one) => one.state === state)
  const { id: enrolmentId, takenBy } = found[pick % Math.max(1, found.length)] ?? {}
  const golfer = scene.golfers.find(({ account }) => account.id === takenBy)
  if (!enrolmentId || !golfer) return null
  const { person } = golfer
  const params = { ...scene.params, enrolmentId }
  return { person, enrolment: await person.must('enrolments.read', { params }) }
}

export function golferOf({ golfers }: Scene, who: number): SignedUp {
  const golfer = golfers[who]
  if (!golfer) throw new Error(`there is no golfer ${who}`)
  return golfer
}

/** A session by its place in the run; -1 is the run itself, which names none. */
export function sessionOf({ clinic }: Scene, at: number): { sessionId?: string } {
  const session = clinic.sessions[at]
  return session ? { sessionId: session.id } : {}
}
