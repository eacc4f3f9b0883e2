/**
 * The accents an academy chooses from: each for the light and for after dusk. All reach a contrast of
 * 4.5 on sand in the light, and on night paper in the dark; `accents.test.ts` works that out.
 */
export const ACCENTS = [
  { name: 'Marram green', accent: '#26563d', accentDusk: '#9ecba8' },
  { name: 'Sea blue', accent: '#1d5470', accentDusk: '#8fc3dd' },
  { name: 'Heather', accent: '#5d3a66', accentDusk: '#cfaad8' },
  { name: 'Rust', accent: '#84381c', accentDusk: '#e5a98d' },
  { name: 'Slate', accent: '#3a4654', accentDusk: '#b4c3d2' },
  { name: 'Claret', accent: '#7a2440', accentDusk: '#e3a1b5' },
] as const

export const accentName = (accent: string): string =>
  ACCENTS.find((each) => each.accent === accent)?.name ?? 'Own'
