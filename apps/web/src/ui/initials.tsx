/** Somebody's initials in a printed box; the name stands beside it. */
export function Initials({ of: initials }: { of: string }) {
  return (
    <span className="ini" aria-hidden>
      {initials}
    </span>
  )
}

export function Pennon() {
  return (
    <svg className="pennon" viewBox="0 0 14 20" aria-hidden>
      <path d="M1 0h1.600v20H1z" fill="var(--color-ink)" />
      <path d="M2.600 1.200 13.400 5 2.600 8.900z" fill="currentColor" />
    </svg>
  )
}

/** "Priya Nandakumar" is PN. */
export function initialsOf(name: string): string {
  const words = name.split(/\s+/).filter(Boolean)
  return [words[0], words.length > 1 ? words.at(-1) : undefined]
    .map((word) => word?.match(/\p{L}/u)?.[0] ?? '')
    .join('')
    .toLocaleUpperCase('en')
}
