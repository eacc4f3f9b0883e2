import type { Answer } from '@marram/contract'
import { toCurrencyCode, toDecimal } from '@marram/money'
import { pathOf } from '@marram/contract'
import { isReservedSlug } from '../academies/rules'
import { Problem } from '../platform/errors'
import type { Services } from '../platform/services'
import type { DescribePage } from '../platform/web/web-app'
import type { PageHead } from '../platform/web/page-html'
import { readAcademyPage, readClinicOnPage } from './page'

const APP: PageHead = {
  title: 'Marram',
  description: 'Clinics, places, registers and books for golf teaching academies.',
  isIndexed: false,
}

/** The heads of public pages; every other page of the app has a plain one. */
export function describePages(services: Services): DescribePage {
  return async (request) => {
    const [slug, section, clinic, ...rest] = request.path.split('/').filter(Boolean)
    if (!slug || isReservedSlug(slug)) return slug ? APP : { ...APP, isIndexed: true }
    if (section && section !== 'clinics') return APP
    if (rest.length > 0 || (section && !clinic)) return null
    try {
      const reader = { slug, maySeeUnpublished: false }
      return clinic
        ? describeClinic(services, await readClinicOnPage(services, { ...reader, clinic }))
        : describeAcademy(services, await readAcademyPage(services, reader))
    } catch (error) {
      // A page that is not up may still be looked at by staff, who get it from the app.
      if (error instanceof Problem && error.code === 'not-found') return null
      throw error
    }
  }
}

function describeAcademy({ config }: Services, page: Answer<'page.read'>): PageHead {
  const { academy, clinics } = page
  return {
    title: `${academy.name}: golf clinics in ${academy.place}`,
    description: academy.lead || `Golf clinics at ${academy.name}, ${academy.place}.`,
    isIndexed: true,
    structured: clinics.slice(0, 30).map((clinic) => ({
      '@context': 'https://schema.org',
      '@type': 'Event',
      name: clinic.title,
      description: clinic.summary,
      startDate: clinic.startsAt,
      endDate: clinic.endsAt,
      eventStatus: 'https://schema.org/EventScheduled',
      eventAttendanceMode: 'https://schema.org/OfflineEventAttendanceMode',
      location: placeOf({ name: academy.name, address: academy.address || academy.place }),
      organizer: { '@type': 'Organization', name: academy.name },
      offers: offerOf(
        clinic,
        academy.currency,
        `${config.publicUrl}/${academy.slug}/clinics/${clinic.slug}`,
      ),
    })),
    data: { key: pathOf('page.read', { academy: academy.slug }), answer: page },
  }
}

function describeClinic({ config }: Services, page: Answer<'page.clinic'>): PageHead {
  const { academy, clinic } = page
  const url = `${config.publicUrl}/${academy.slug}/clinics/${clinic.slug}`
  return {
    title: `${clinic.title} – ${academy.name}`,
    description: clinic.summary,
    isIndexed: true,
    structured: {
      '@context': 'https://schema.org',
      '@type': 'Event',
      name: clinic.title,
      description: clinic.summary,
      url,
      startDate: clinic.sessions[0]?.startsAt ?? clinic.startsAt,
      endDate: clinic.sessions.at(-1)?.endsAt ?? clinic.endsAt,
      eventStatus: 'https://schema.org/EventScheduled',
      eventAttendanceMode: 'https://schema.org/OfflineEventAttendanceMode',
      location: {
        ...placeOf(clinic.venue),
        geo: {
          '@type': 'GeoCoordinates',
          latitude: clinic.venue.latitudeDeg,
          longitude: clinic.venue.longitudeDeg,
        },
      },
      organizer: { '@type': 'Organization', name: academy.name },
      performer: clinic.coaches.map((name) => ({ '@type': 'Person', name })),
      offers: offerOf(clinic, academy.currency, url),
      subEvent: clinic.sessions.map((session) => ({
        '@type': 'Event',
        name: `${clinic.title}, session ${session.number}`,
        startDate: session.startsAt,
        endDate: session.endsAt,
        location: placeOf(clinic.venue),
        eventStatus:
          session.state === 'called-off'
            ? 'https://schema.org/EventCancelled'
            : 'https://schema.org/EventScheduled',
      })),
    },
    data: {
      key: pathOf('page.clinic', { academy: academy.slug, clinic: clinic.slug }),
      answer: page,
    },
  }
}

const placeOf = ({ name, address }: { name: string; address: string }) => ({
  '@type': 'Place',
  name,
  address,
})

function offerOf(
  clinic: {
    runPriceMinor: number | null
    dropInPriceMinor: number | null
    payMode: string
    capacity: number
    taken: number
  },
  currency: string,
  url: string,
) {
  const amountMinor =
    clinic.payMode === 'free' ? 0 : (clinic.runPriceMinor ?? clinic.dropInPriceMinor ?? 0)
  const isFull = clinic.taken >= clinic.capacity
  return {
    '@type': 'Offer',
    price: toDecimal({ amountMinor, currency: toCurrencyCode(currency) }),
    priceCurrency: currency,
    availability: isFull ? 'https://schema.org/SoldOut' : 'https://schema.org/InStock',
    url,
  }
}
