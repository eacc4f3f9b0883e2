import { ROUTES, type RouteKey, type Sent } from '@marram/contract'
import { clinicFields, nextNumber } from '../support/builders'
import { swingFields } from '../support/swings'
import type { World } from '../support/world'
import { dependant, type Season } from './season'
import * as prepare from './prepare'

const TENANT = '/api/academies/:academy'

type PathOf<K extends RouteKey> = (typeof ROUTES)[K]['path']
export type TenantRoute = {
  [K in RouteKey]: PathOf<K> extends `${typeof TENANT}${string}` ? K : never
}[RouteKey]

/** Every route of an academy, as the contract lists them. */
export const TENANT_ROUTES = (Object.keys(ROUTES) as RouteKey[]).filter((key) =>
  ROUTES[key].path.startsWith(TENANT),
) as TenantRoute[]

export interface Call<K extends RouteKey> {
  params?: Record<string, string>
  query?: Record<string, string>
  body?: Sent<K, 'body'>
}

type Sample<K extends RouteKey> = (season: Season, world: World) => Call<K> | Promise<Call<K>>

const nothing = () => ({})
const year = () => ({ params: { year: '2031' } })

/**
 * For every route of an academy a call that goes well for whoever may make it, and only for them.
 * What a call uses up is made anew each time. A new route is not complete without its line here.
 */
export const SAMPLES: { [K in TenantRoute]: Sample<K> } = {
  'academies.read': nothing,
  'academies.change': () => ({ body: { lead: `Lead ${nextNumber()}` } }),
  'academies.publish': () => ({ body: { isPublished: true } }),
  'staff.list': nothing,
  'staff.remove': prepare.memberToRemove,
  'invitations.send': async (season) => ({
    body: {
      email: `invited-${nextNumber()}@mail.example`,
      role: 'coach',
      coachId: await prepare.untiedCoach(season),
    },
  }),
  'invitations.withdraw': async (season) => ({ params: await prepare.openInvitation(season) }),

  'venues.list': nothing,
  'venues.add': () => ({ body: { name: 'Sea course', latitudeDeg: 53, longitudeDeg: -6 } }),
  'venues.change': ({ venue }) => ({ params: { venueId: venue.id }, body: { name: 'Skerrow' } }),
  'areas.add': ({ venue }) => ({
    params: { venueId: venue.id },
    body: { name: 'Green', kind: 'putting', units: 9, hasLamps: false, isCovered: false },
  }),
  'areas.change': ({ area }) => ({ params: { areaId: area.id }, body: { name: 'Range' } }),
  'coaches.list': nothing,
  'coaches.add': () => ({ body: { name: 'Eithne Gorse' } }),
  'coaches.change': ({ coach }) => ({ params: { coachId: coach.id }, body: { about: 'Wedges.' } }),

  'golfers.mine': nothing,
  'golfers.add-dependant': () => ({ body: dependant() }),
  'golfers.list': nothing,
  'golfers.enter': () => ({ body: { name: 'Walk-in Farrelly' } }),
  'golfers.read': ({ golferId }) => ({ params: { golferId } }),
  'golfers.change': ({ golferId }) => ({ params: { golferId }, body: { notes: 'Fades it.' } }),

  'page.read': nothing,
  'page.clinic': ({ clinic }) => ({ params: { clinic: clinic.slug } }),
  'clinics.preview': (season) => ({ body: prepare.scheduleOf(season) }),
  'clinics.list': nothing,
  'clinics.draft': (season) => ({ body: clinicFields(season) }),
  'clinics.read': ({ clinic }) => ({ params: { clinicId: clinic.id } }),
  'clinics.change': async (season) => ({
    params: await prepare.draft(season),
    body: { ...clinicFields(season), title: 'Changed' },
  }),
  'clinics.publish': ({ clinic }) => ({
    params: { clinicId: clinic.id },
    body: { isPublished: true },
  }),
  'clinics.throw-away': async (season) => ({ params: await prepare.draft(season) }),
  'sessions.list': () => ({ query: { from: '2031-04-01', to: '2031-04-07' } }),
  'sessions.change': async (season) => ({
    params: { sessionId: await prepare.lastPlannedSession(season) },
    body: { durationMinutes: 60 },
  }),
  'sessions.call-off': async (season) => ({
    params: { sessionId: await prepare.lastPlannedSession(season) },
    body: { reason: 'Fog' },
  }),

  'enrolments.mine': nothing,
  'enrolments.hold': async (season) => ({
    body: prepare.dropIn(season, await prepare.newDependant(season)),
  }),
  'enrolments.read': ({ enrolment }) => ({ params: { enrolmentId: enrolment.id } }),
  'enrolments.release': async (season) => ({ params: await prepare.hold(season) }),
  'enrolments.give': async (season) => ({
    body: {
      clinicId: season.putting.id,
      golferId: await prepare.enteredGolfer(season),
      isException: true,
    },
  }),
  'enrolments.of-clinic': ({ clinic }) => ({ params: { clinicId: clinic.id } }),
  'enrolments.of-golfer': ({ golferId }) => ({ params: { golferId } }),
  'waitlist.join': async (season) => ({
    body: { clinicId: season.clinic.id, golferId: await prepare.newDependant(season) },
  }),
  'waitlist.leave': async (season) => ({ params: await prepare.waitlistEntry(season) }),

  'checkout.start': async (season) => ({ params: await prepare.hold(season) }),
  'checkout.at-desk': async (season) => ({ params: await prepare.hold(season) }),
  'checkout.quote-giving-up': async (season) => ({ params: await prepare.confirmed(season) }),
  'checkout.give-up': async (season) => ({
    params: await prepare.confirmed(season),
    body: { refundMinor: 0 },
  }),
  'checkout.quote-giving-up-for': async (season) => ({ params: await prepare.confirmed(season) }),
  'checkout.give-up-for': async (season) => ({
    params: await prepare.confirmed(season),
    body: { refundMinor: 0 },
  }),
  'checkout.choose': async (season, world) => ({
    params: { placeId: await prepare.owedPlace(season, world) },
    body: { choice: 'money' },
  }),
  'checkout.take-cash': async (season) => ({
    params: await prepare.confirmed(season),
    body: { amountMinor: 3_500 },
  }),
  'payments.read': nothing,
  'payments.connect': nothing,

  'register.day': ({ clinic }) => ({ params: { date: clinic.startsOnLocal } }),
  'register.read': (season) => ({ params: { sessionId: prepare.firstSession(season) } }),
  'register.mark': async (season) => ({
    params: await prepare.placeToMark(season),
    body: { mark: 'late' },
  }),
  'register.close': async (season) => {
    const sessionId = prepare.firstSession(season)
    return { params: { sessionId }, body: { revision: await prepare.openRegister(season) } }
  },
  'register.reopen': async (season) => {
    const sessionId = prepare.firstSession(season)
    return { params: { sessionId }, body: { revision: await prepare.closedRegister(season) } }
  },
  'register.card': ({ clinic }) => ({ params: { clinicId: clinic.id } }),

  'swings.record': ({ golferId }) => ({ params: { golferId }, body: swingFields() }),
  'swings.of-golfer': ({ golferId }) => ({ params: { golferId } }),
  'swings.read': ({ swingId }) => ({ params: { swingId } }),
  'swings.remove': async (season) => ({ params: { swingId: await prepare.swing(season) } }),
  'swings.compare': ({ swingId, laterSwingId }) => ({
    params: { swingId },
    query: { with: laterSwingId },
  }),
  'swings.mine': ({ golferId }) => ({ params: { golferId } }),
  'swings.read-mine': ({ swingId }) => ({ params: { swingId } }),
  'swings.compare-mine': ({ swingId }) => ({ params: { swingId }, query: { with: 'target' } }),
  'targets.read': ({ golferId }) => ({ params: { golferId } }),
  'targets.read-mine': ({ golferId }) => ({ params: { golferId } }),
  'targets.set': ({ golferId }) => ({
    params: { golferId },
    body: { club: '7-iron', wrist: swingFields().wrist },
  }),
  'coaching-settings.read': nothing,
  'coaching-settings.change': () => ({ body: { toleranceDeg: 2.5 } }),

  'ledger.card': year,
  'ledger.transfers': ({ clinic }) => ({
    query: { figure: 'earned', year: '2031', month: '4', clinicId: clinic.id },
  }),
  'ledger.export': () => ({ query: { year: '2031' } }),
}
