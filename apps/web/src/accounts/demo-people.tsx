import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router'
import { paths } from '../paths'
import { demoPeopleQuery } from './queries'

/** In a demonstration, people to look around as; elsewhere, what somebody new can do. */
export function DemoPeople({
  onPick,
}: {
  onPick: (body: { email: string; password: string }) => void
}) {
  const demo = useQuery(demoPeopleQuery())
  if (!demo.data) {
    return (
      <div>
        <h2>New here?</h2>
        <p className="lead my-3">
          Take a place in a clinic and your account is made on the way. There is nothing to fill in
          before you have seen a price.
        </p>
        <Link to={paths.open()}>Open an academy of your own</Link>
      </div>
    )
  }
  const { people, password } = demo.data
  return (
    <div>
      <h2>Look around as</h2>
      <p className="soft my-3">Invented people of two invented academies. Press one to sign in.</p>
      <ul className="reg">
        {people.map((person) => (
          <li key={person.email}>
            <button
              type="button"
              className="person"
              onClick={() => onPick({ email: person.email, password })}
            >
              <b>{person.name}</b>
              <small>
                {person.what}, {person.academy}
              </small>
            </button>
          </li>
        ))}
      </ul>
    </div>
  )
}
