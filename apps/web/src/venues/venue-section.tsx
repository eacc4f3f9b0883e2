import { useState } from 'react'
import { Button } from '../ui/button'
import { AreaDialog } from './area-dialog'
import { lightOf, type Area, type Venue } from './area-words'
import { VenueDialog } from './venue-dialog'

/** Where the academy teaches: each venue with its areas. */
export function VenueSection(props: {
  slug: string
  venues: readonly Venue[]
  mayChange: boolean
}) {
  const { slug, venues, mayChange } = props
  const [isAdding, setIsAdding] = useState(false)
  return (
    <section aria-labelledby="venues">
      <div className="sect">
        <h2 id="venues">Venues and areas</h2>
        {mayChange && <Button onClick={() => setIsAdding(true)}>New venue</Button>}
      </div>
      {venues.length === 0 && (
        <p className="lead py-3">No venue yet. A clinic needs a place with an area.</p>
      )}
      {venues.map((venue) => (
        <VenueCard key={venue.id} slug={slug} venue={venue} mayChange={mayChange} />
      ))}
      {isAdding && <VenueDialog slug={slug} venue={null} onClose={() => setIsAdding(false)} />}
    </section>
  )
}

function VenueCard(props: { slug: string; venue: Venue; mayChange: boolean }) {
  const { slug, venue, mayChange } = props
  const [isChanging, setIsChanging] = useState(false)
  const [area, setArea] = useState<Area | 'new' | null>(null)
  return (
    <>
      <div className="venuehead">
        <div>
          <h3>{venue.name}</h3>
          <p className="soft">
            {degrees(venue.latitudeDeg, 'north', 'south')},{' '}
            {degrees(venue.longitudeDeg, 'east', 'west')}
            {venue.address && ` · ${venue.address}`}
          </p>
        </div>
        {mayChange && (
          <span className="actions">
            <Button kind="quiet" onClick={() => setIsChanging(true)}>
              Change {venue.name}
            </Button>
            <Button onClick={() => setArea('new')}>New area</Button>
          </span>
        )}
      </div>
      <AreaTable areas={venue.areas} {...(mayChange ? { onChange: setArea } : {})} />
      {isChanging && <VenueDialog slug={slug} venue={venue} onClose={() => setIsChanging(false)} />}
      {area && (
        <AreaDialog
          slug={slug}
          venueId={venue.id}
          area={area === 'new' ? null : area}
          onClose={() => setArea(null)}
        />
      )}
    </>
  )
}

/** The areas of a venue, with their bays and their light. */
function AreaTable(props: { areas: readonly Area[]; onChange?: (area: Area) => void }) {
  const { areas, onChange } = props
  return (
    <div className="card mb-5">
      <table className="sc jv">
        <thead>
          <tr>
            <th scope="col">Area</th>
            <th scope="col" className="ctr">
              Bays
            </th>
            <th scope="col" className="l">
              Lamps
            </th>
            <th scope="col" className="l">
              Cover
            </th>
            <th scope="col" className="l">
              <span className="vh">Change</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {areas.map((each) => (
            <tr key={each.id}>
              <th scope="row">{each.name}</th>
              <td className="ctr">
                <b>{each.units}</b>
              </td>
              <td className="l">{lightOf(each)}</td>
              <td className="l">{each.isCovered ? 'Covered' : 'Open'}</td>
              <td className="l">
                {onChange && (
                  <button type="button" className="linkish" onClick={() => onChange(each)}>
                    Change<span className="vh"> {each.name}</span>
                  </button>
                )}
              </td>
            </tr>
          ))}
          {areas.length === 0 && (
            <tr>
              <td colSpan={5} className="l">
                No area yet. Say what golfers stand on here.
              </td>
            </tr>
          )}
        </tbody>
      </table>
    </div>
  )
}

/** "53.8512 north" */
const degrees = (value: number, positive: string, negative: string): string =>
  `${Math.abs(value)} ${value < 0 ? negative : positive}`
