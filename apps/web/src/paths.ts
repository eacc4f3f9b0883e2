/** Every address of the web app. Links are made here and nowhere else. */
const enc = encodeURIComponent

export const paths = {
  home: () => '/',
  signIn: (to?: string) => `/sign-in${to ? `?to=${enc(to)}` : ''}`,
  google: (to: string) => `/auth/google?to=${enc(to)}`,
  forgotten: () => '/reset',
  verify: () => '/verify',
  invitation: () => '/invitation',
  open: (academy?: string) => `/open${academy ? `?academy=${academy}` : ''}`,
  gallery: () => '/ui',
  academy: (academy: string) => `/${academy}`,
  clinic: (academy: string, clinic: string) => `/${academy}/clinics/${clinic}`,
  my: (academy: string) => `/${academy}/my`,
  myPlaces: (academy: string) => `/${academy}/my/places`,
  myPlace: (academy: string, enrolmentId: string) => `/${academy}/my/places/${enrolmentId}`,
  family: (academy: string) => `/${academy}/my/family`,
  desk: (academy: string) => `/${academy}/desk`,
  week: (academy: string, from?: string) => `/${academy}/desk/week${from ? `?from=${from}` : ''}`,
  today: (academy: string, date?: string) => `/${academy}/desk/today${date ? `?day=${date}` : ''}`,
  clinics: (academy: string) => `/${academy}/desk/clinics`,
  newClinic: (academy: string) => `/${academy}/desk/clinics/new`,
  clinicCard: (academy: string, clinicId: string) => `/${academy}/desk/clinics/${clinicId}`,
  changeClinic: (academy: string, clinicId: string) =>
    `/${academy}/desk/clinics/${clinicId}/change`,
  golfers: (academy: string) => `/${academy}/desk/golfers`,
  golfer: (academy: string, golferId: string) => `/${academy}/desk/golfers/${golferId}`,
  money: (academy: string, year?: number) => `/${academy}/desk/money${year ? `?year=${year}` : ''}`,
  setUp: (academy: string) => `/${academy}/desk/set-up`,
} as const
