import { makeLink, signUp, verifyEmail } from '../accounts/accounts'
import { addMyDependant, type Person } from '../golfers/golfers'
import type { Services } from '../platform/services'
import { CHILD_NAMES, FIRST_NAMES } from './names'
import { DEMO_PASSWORD } from './people'
import type { Random } from './random'
import type { AcademyScript } from './script'

export interface DemoGolfer {
  person: Person
  handicap: number | null
  /** Children they look after, with their age. */
  children: { golferId: string; ageYears: number }[]
}

const MOST_CHILDREN = 2

/** Makes the academy's golfers: about one in six looks after a child or two. */
export async function makeGolfers(
  services: Services,
  given: {
    academyId: string
    script: AcademyScript
    familyNames: readonly string[]
    random: Random
    today: Date
  },
): Promise<DemoGolfer[]> {
  const { academyId, script, familyNames, random } = given
  const names = random.shuffle(
    FIRST_NAMES.flatMap((first) => familyNames.map((family) => ({ first, family }))),
  )
  const golfers: DemoGolfer[] = []
  for (const [index, { first, family }] of names.slice(0, script.golfers).entries()) {
    const name = `${first} ${family}`
    const email = `golfer${index + 1}.${script.open.slug}@${script.mailDomain}`
    const person = await makePerson(services, { name, email })
    const handicap = random.chance(0.85) ? random.between(4, 36) : null
    const golfer: DemoGolfer = { person, handicap, children: [] }
    if (random.chance(0.17)) {
      for (let child = random.between(1, MOST_CHILDREN); child > 0; child -= 1) {
        const ageYears = random.between(7, 15)
        golfer.children.push(
          await addChild(services, { ...given, academyId, person, family, ageYears }),
        )
      }
    }
    golfers.push(golfer)
  }
  return golfers
}

/** Somebody with an account and a confirmed address, whose password is the demo's. */
export async function makePerson(
  services: Services,
  { name, email }: { name: string; email: string },
): Promise<Person> {
  const id = await signUp(services, { name, email, password: DEMO_PASSWORD })
  const link = await makeLink(services, { accountId: id, purpose: 'verify' })
  if (link) await verifyEmail(services, { secret: link.secret, accountId: id })
  return { id, name, email, isVerified: true }
}

export async function addChild(
  services: Services,
  given: {
    academyId: string
    person: Person
    family: string
    ageYears: number
    random: Random
    today: Date
  },
): Promise<{ golferId: string; ageYears: number }> {
  const { academyId, person, family, ageYears, random, today } = given
  const born = new Date(today)
  born.setUTCFullYear(today.getUTCFullYear() - ageYears)
  born.setUTCDate(born.getUTCDate() - random.between(20, 300))
  const dependant = {
    name: `${random.pick(CHILD_NAMES)} ${family}`,
    bornOn: born.toISOString().slice(0, 10),
    handicap: ageYears > 12 && random.chance(0.4) ? random.between(24, 54) : null,
    emergencyContact: { name: person.name, phone: `+353 85 555 ${random.between(1000, 9999)}` },
    hasConsent: true as const,
  }
  const golfer = await addMyDependant(services, { academyId, person, dependant })
  return { golferId: golfer.id, ageYears }
}
