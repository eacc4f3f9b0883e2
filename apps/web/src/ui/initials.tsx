import { Drawing } from './drawing'

/** Somebody's initials in a printed box; the name stands beside it. */
export function Initials({ of: initials }: { of: string }) {
  return (
    <span className="ini" aria-hidden>
      {initials}
    </span>
  )
}

/** The academy's pennon, in its accent; its name follows. */
export const Pennon = () => <Drawing of="pennon" className="pennon" />

/** "Priya Nandakumar" is PN. */
export function initialsOf(name: string): string {
  const words = name.split(/\s+/).filter(Boolean)
  return [words[0], words.length > 1 ? words.at(-1) : undefined]
    .map((word) => word?.match(/\p{L}/u)?.[0] ?? '')
    .join('')
    .toLocaleUpperCase('en')
}
