import { checkoutListeners } from '../checkout/listeners'
import { makeStripeProvider } from '../checkout/stripe-provider'
import { messagingListeners } from '../messaging/listeners'
import { makeMessenger } from '../messaging/messaging'
import type { MailProvider } from '../messaging/provider'
import { makeSendgridProvider } from '../messaging/sendgrid-provider'
import type { MovableClock } from '../platform/clock'
import { connect } from '../platform/db/connect'
import { makeDispatcher } from '../platform/outbox/dispatch'
import { sweepDue } from '../platform/outbox/sweep'
import type { Services } from '../platform/services'
import { listPublishedAcademies } from '../platform/tenancy/look-ups'
import { buildAcademy } from './academy'
import { makeDemoProvider } from './demo-provider'
import { addChild, makeGolfers, makePerson } from './golfers'
import { JUNIPER } from './juniper'
import { KITTIWAKE } from './kittiwake'
import { FAMILY_NAMES, WESTERN_FAMILY_NAMES } from './names'
import { planClinic } from './play'
import { makeRandom } from './random'
import type { AcademyScript } from './script'
import { Season } from './season'

export interface DemoLoading {
  /** The services' own clock, moved through the season that lies behind. */
  clock: MovableClock
  say: (line: string) => void
}

const DAY_MS = 86_400_000
const WEEKS_BEHIND = 11
/** Mail of the last days is in the mailbox; what was written earlier has been read long ago. */
const MAIL_DAYS = 2

/** Loads the demo academies through the use cases, unless an academy is open already. */
export async function loadDemo(services: Services, { clock, say }: DemoLoading): Promise<void> {
  if ((await listPublishedAcademies(services.db)).length > 0) return
  const today = clock.now()
  const { payments: paymentsConfig } = services.config
  if (!paymentsConfig.url) throw new Error('The demo needs the payments stand-in.')
  const provider = await makeDemoProvider(makeStripeProvider(paymentsConfig), {
    url: paymentsConfig.url,
    clock,
  })
  const mail = onlyLately(services, today)
  const dispatch = connect({ url: services.config.database.dispatchUrl, poolSize: 1, name: 'demo' })
  const dispatcher = makeDispatcher({
    url: services.config.database.dispatchUrl,
    listeners: {
      checkout: checkoutListeners(services, provider),
      messaging: messagingListeners(services, makeMessenger(services, mail)),
    },
    onError: (err, queue) => services.log.error({ err, queue }, 'an event could not be handled'),
  })
  const settle = async () => {
    await sweepDue(services, dispatch)
    await dispatcher.drain()
  }
  try {
    for (const script of [KITTIWAKE, JUNIPER]) {
      await playAcademy(services, { script, provider, clock, today, settle })
      say(`${script.open.name} is there`)
    }
  } finally {
    await dispatcher.stop()
    await dispatch.destroy()
    await provider.release()
  }
}

async function playAcademy(
  services: Services,
  given: {
    script: AcademyScript
    provider: Awaited<ReturnType<typeof makeDemoProvider>>
    clock: MovableClock
    today: Date
    settle: () => Promise<void>
  },
): Promise<void> {
  const { script, provider, clock, today, settle } = given
  const random = makeRandom(script.seed)
  const began = new Date(today.getTime() - WEEKS_BEHIND * 7 * DAY_MS)
  clock.moveTo(began)
  const academy = await buildAcademy(services, provider, script, today)
  const isKittiwake = script === KITTIWAKE
  const familyNames = isKittiwake ? FAMILY_NAMES : WESTERN_FAMILY_NAMES
  const { academyId } = academy
  const golfers = await makeGolfers(services, { academyId, script, familyNames, random, today })
  if (isKittiwake) golfers.unshift(await makeGuardian(services, { academyId, random, today }))
  const season = new Season()
  for (const clinic of academy.clinics) {
    planClinic({ services, provider, academy, golfers, random, season, began, today }, clinic)
  }
  await season.play({ until: today, moveTo: (at) => clock.moveTo(at), after: settle })
  clock.moveTo(today)
  await settle()
}

/** The golfer whom visitors of the demo try out: plays herself and looks after two children. */
async function makeGuardian(
  services: Services,
  given: { academyId: string; random: ReturnType<typeof makeRandom>; today: Date },
) {
  const person = await makePerson(services, {
    name: 'Priya Nandakumar',
    email: 'priya@golfer.example',
  })
  const family = 'Nandakumar'
  const younger = await addChild(services, { ...given, person, family, ageYears: 8 })
  const older = await addChild(services, { ...given, person, family, ageYears: 13 })
  return { person, handicap: 21, children: [younger, older] }
}

function onlyLately(services: Services, today: Date): MailProvider {
  const provider = makeSendgridProvider(services.config.mail)
  const since = today.getTime() - MAIL_DAYS * DAY_MS
  return {
    send: (mail) =>
      services.clock.now().getTime() >= since ? provider.send(mail) : Promise.resolve('read'),
  }
}
