import { Mark, MarkKey, type MarkName } from '../ui/mark'

const ROWS: readonly { name: string; marks: readonly MarkName[] }[] = [
  { name: 'Ines Falk', marks: ['present', 'present', 'late', 'not-yet'] },
  { name: 'Tomás Reilly', marks: ['absent', 'present', 'excused', 'not-yet'] },
]

/** The card with each of its marks, a column called off, and what is paid but not yet played. */
export function GalleryCard() {
  return (
    <>
      <div className="card">
        <table className="sc att rfold">
          <thead>
            <tr>
              <th scope="col">Golfer</th>
              {['3 Sep', '10 Sep', '17 Sep', '24 Sep'].map((day) => (
                <th key={day} scope="col" className="ctr">
                  {day}
                </th>
              ))}
              <th scope="col" className="ctr fold">
                1 Oct
              </th>
              <th scope="col" className="tot">
                Paid
              </th>
            </tr>
          </thead>
          <tbody>
            {ROWS.map(({ name, marks }) => (
              <tr key={name}>
                <th scope="row">{name}</th>
                {marks.map((mark, index) => (
                  <td key={index} className={index === 2 ? 'mk now' : 'mk'}>
                    <Mark mark={mark} />
                  </td>
                ))}
                <td className="mk fold off">
                  <span className="vh">Called off</span>
                </td>
                <td className="tot pencilled">108.00</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <MarkKey />
    </>
  )
}
