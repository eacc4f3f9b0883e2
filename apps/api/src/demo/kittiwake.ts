import { KITTIWAKE_CLINICS } from './kittiwake-clinics'
import type { AcademyScript } from './script'

/** Kittiwake Links Academy: the invented academy by the sea that most examples use. */
export const KITTIWAKE: AcademyScript = {
  seed: 20_260_917,
  open: {
    name: 'Kittiwake Links Academy',
    place: 'Carrowmoyle',
    slug: 'kittiwake-links',
    zone: 'Europe/Dublin',
    currency: 'EUR',
    taxMode: 'included',
    taxName: 'VAT',
    taxBasisPoints: 900,
  },
  settings: {
    lead: 'Golf taught outdoors, on the strand at Carrowmoyle. Small groups, four coaches, and a wind that teaches the rest.',
    address: 'Strand Road, Carrowmoyle',
    accent: '#1d5470',
    accentDusk: '#86bcd6',
  },
  staff: [
    { name: 'Aoife Kerrane', email: 'aoife@kittiwake.example', role: 'owner' },
    { name: 'Nuala Brogan', email: 'nuala@kittiwake.example', role: 'desk' },
    { name: 'Piotr Halloran', email: 'piotr@books.example', role: 'bookkeeper' },
  ],
  coaches: [
    {
      name: 'Aoife Kerrane',
      email: 'aoife@kittiwake.example',
      about: 'Head coach. Short game and the club face; fifteen winters on this strand.',
    },
    {
      name: 'Donal Tuohy',
      email: 'donal@kittiwake.example',
      about: 'Full swing and driver. Was a joiner, still measures twice.',
    },
    {
      name: 'Ruairí Deasy',
      email: 'ruairi@kittiwake.example',
      about: 'Putting and juniors. Brings the small clubs and the patience.',
    },
    {
      name: 'Marta Wilk',
      email: 'marta@kittiwake.example',
      about: 'Swing bench and coming back from injury, with your physio.',
    },
  ],
  venues: [
    {
      name: 'Strand Road',
      address: 'Strand Road, Carrowmoyle',
      gettingHere: 'Past the slipway, second gate. Parking by the range hut.',
      latitudeDeg: 53.59,
      longitudeDeg: -6.1,
      areas: [
        { name: 'Range bays', kind: 'range', units: 12, hasLamps: true, isCovered: true },
        {
          name: 'Short-game area',
          kind: 'short-game',
          units: 8,
          hasLamps: false,
          isCovered: false,
        },
        { name: 'Putting green', kind: 'putting', units: 9, hasLamps: false, isCovered: false },
      ],
    },
    {
      name: 'Mill Lane',
      address: 'The Old Mill, Mill Lane, Carrowmoyle',
      gettingHere: 'Upstairs. The door on the yard side is open half an hour before.',
      latitudeDeg: 53.6,
      longitudeDeg: -6.12,
      areas: [{ name: 'Indoor studio', kind: 'indoor', units: 4, hasLamps: true, isCovered: true }],
    },
  ],
  golfers: 118,
  mailDomain: 'golfer.example',
  clinics: KITTIWAKE_CLINICS,
}
