export interface FakePerson {
  sub: string
  name: string
  email: string
  /** Whether the identity provider has seen that the address is theirs. */
  isVerified: boolean
}

/** Who can sign in without typing an address. All of them are invented. */
export const PEOPLE: readonly FakePerson[] = [
  { sub: '100001', name: 'Greta Maslow', email: 'greta.maslow@mail.example', isVerified: true },
  { sub: '100002', name: 'Hugo Vandeleur', email: 'hugo.vandeleur@mail.example', isVerified: true },
  { sub: '100003', name: 'Vera Quirke', email: 'vera.quirke@mail.example', isVerified: false },
]

/** Somebody typed in by address; the same address is the same person next time. */
export function personByEmail(people: FakePerson[], typed: string): FakePerson {
  const email = typed.trim().toLowerCase()
  const had = people.find((person) => person.email === email)
  if (had) return had
  const name = email.split('@')[0] ?? email
  const person = { sub: String(200_000 + people.length), name, email, isVerified: true }
  people.push(person)
  return person
}
