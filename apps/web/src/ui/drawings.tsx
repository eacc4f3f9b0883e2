/** Every drawing of the product, as paths of our own; they take the colour of the text. */
export const DRAWINGS = {
  logo: {
    viewBox: '0 0 32 32',
    paths: (
      <>
        <g fill="currentColor">
          <path d="M.8 28.2C5.400 21.700 11 20.400 15.800 22.800c4.600 2.300 9.600 2.300 15.400-1.700-4.700 6.300-10.600 6.900-16.100 4.300C10.400 23.200 5.800 23.900.8 28.200z" />
          <path d="M13 24C12.200 15.200 14.500 7.500 22.300 1.800c-3.700 6.300-5.700 13.300-5.600 23.400z" />
          <path d="M9.300 23.200C9.200 16.800 7.700 12.100 3.800 8.500c6.200 2.700 8.600 7.900 8.400 15z" />
          <path d="M17.900 25.600C18.500 17.800 22 12.500 29.200 10.300c-5.500 3.400-8 8.300-8.300 16z" />
        </g>
      </>
    ),
  },
  present: {
    viewBox: '0 0 24 24',
    paths: (
      <>
        <path d="M3.600 13.300c1.900 1 3.400 2.700 4.600 5C10.300 11.700 14.200 6.500 21.200 2.900 15.600 8 12 14 9.700 21.300c-.3.9-1.400.9-1.700 0C7 18.600 5.400 16.400 3.100 14.700c-.8-.6-.3-1.800.5-1.400z" />
        <path
          d="M20.900 3.700C15.700 7.500 12.300 12 9.900 17.800"
          fill="none"
          stroke="currentColor"
          strokeWidth=".7"
          opacity=".45"
        />
      </>
    ),
  },
  late: {
    viewBox: '0 0 24 24',
    paths: (
      <>
        <path d="M3 19.300c5.600-.7 11.600-.8 18-.3.8.1.8 1.700 0 1.700-6.300.1-12.200.3-17.700.9-1 .1-1.200-2.200-.3-2.300z" />
        <path d="M8.300 16.300C9.600 10.900 13 6.700 19.200 3.700 14.900 7.600 12.300 11.500 11 16.400c-.3 1.100-3 1-2.700-.1z" />
      </>
    ),
  },
  absent: {
    viewBox: '0 0 24 24',
    paths: (
      <>
        <path d="M4.400 4.300C9.600 8.400 14.600 13.200 19.700 19c.7.9-.6 2-1.400 1.200C13.300 15 8.600 10.400 3.500 6 2.600 5.200 3.500 3.600 4.400 4.300z" />
        <path d="M19.900 3.900C15.100 9 10.500 14.300 6.200 20.300c-.7 1-2.500.2-1.800-.9C8.700 13.100 13.300 7.800 18.500 2.900c.9-.8 2.200.2 1.400 1z" />
      </>
    ),
  },
  excused: {
    viewBox: '0 0 24 24',
    paths: (
      <>
        <path
          d="M17.200 5.400C13.600 3 8.200 4 5.700 8.200c-2.700 4.500-.7 10 4.400 11.300 5.300 1.300 9.800-2.500 9.700-7.800-.1-3.500-2.200-6.200-5.800-7.400"
          fill="none"
          stroke="currentColor"
          strokeWidth="2"
          strokeLinecap="round"
        />
      </>
    ),
  },
  notYet: {
    viewBox: '0 0 24 24',
    paths: (
      <>
        <path d="M12 9.900c1.400 0 2.200.8 2.200 2.100S13.300 14.200 12 14.200 9.800 13.300 9.900 12s.9-2.100 2.100-2.100z" />
      </>
    ),
  },
  pennon: {
    viewBox: '0 0 14 20',
    paths: (
      <>
        <path d="M1 0h1.600v20H1z" fill="var(--color-ink)" />
        <path d="M2.600 1.200 13.400 5 2.600 8.900z" fill="currentColor" />
      </>
    ),
  },
  flag: {
    viewBox: '0 0 16 16',
    paths: (
      <>
        <path d="M2.200.5h1.600v15H2.200z" fill="currentColor" />
        <path d="M3.800 1 15 4.900 3.800 8.900z" fill="currentColor" />
      </>
    ),
  },
  dusk: {
    viewBox: '0 0 16 16',
    paths: (
      <>
        <path d="M.5 11h15M3 13.800h10" stroke="currentColor" strokeWidth="1.700" fill="none" />
        <path d="M3.200 9.200a4.800 4.800 0 0 1 9.600 0z" fill="currentColor" />
      </>
    ),
  },
  tick: {
    viewBox: '0 0 16 16',
    paths: (
      <>
        <path
          d="M1.600 8.700c1.500.7 2.600 1.900 3.500 3.600C6.800 7.600 9.500 4 14.700 1.400 10.500 5.200 8 9.400 6.300 14.300c-.4 1-1.500 1-1.800 0C3.800 12.400 2.700 11 1 9.800c-.8-.6-.2-1.500.6-1.100z"
          fill="currentColor"
        />
      </>
    ),
  },
  clock: {
    viewBox: '0 0 16 16',
    paths: (
      <>
        <path
          d="M8 1.400a6.600 6.600 0 1 1-.1 0M8 4.300V8.300l2.800 1.900"
          stroke="currentColor"
          strokeWidth="1.700"
          fill="none"
          strokeLinecap="round"
        />
      </>
    ),
  },
  wind: {
    viewBox: '0 0 16 16',
    paths: (
      <>
        <path
          d="M1 5.500h8.500a2.200 2.200 0 1 0-2-3M1 8.500h11.500a2.200 2.200 0 1 1-2 3.100M1 11.500h5.500"
          stroke="currentColor"
          strokeWidth="1.600"
          fill="none"
          strokeLinecap="round"
        />
      </>
    ),
  },
  person: {
    viewBox: '0 0 16 16',
    paths: (
      <>
        <circle cx="8" cy="5.2" r="3.200" fill="none" stroke="currentColor" strokeWidth="1.700" />
        <path
          d="M1.800 15c.7-3.600 3-5.200 6.200-5.200s5.500 1.600 6.200 5.200"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.700"
          strokeLinecap="round"
        />
      </>
    ),
  },
  calendar: {
    viewBox: '0 0 16 16',
    paths: (
      <>
        <path
          d="M1.500 3.500h13v11h-13zM1.500 7h13M5 1v4M11 1v4"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.600"
        />
      </>
    ),
  },
} as const

export type Drawing = keyof typeof DRAWINGS
