import { AttendanceGrid, type GridProps } from './attendance-grid'

const FOLDS_OVER = 4

/** The scorecard: OUT after the first half, IN after the second; on a phone it folds. */
export function AttendanceCard(props: Omit<GridProps, 'layout'>) {
  const { sessions } = props
  const half = sessions.length > FOLDS_OVER ? Math.ceil(sessions.length / 2) : sessions.length
  const halves = [sessions.slice(0, half), sessions.slice(half)].filter((part) => part.length > 0)
  const labels = halves.length > 1 ? ['OUT', 'IN'] : []
  return (
    <>
      <div className="card ondesk scroller">
        <AttendanceGrid {...props} layout={{ halves, labels, hasTotal: true }} />
      </div>
      <div className="foldstack onhand">
        {halves.map((part, index) => {
          const hasTotal = index === halves.length - 1
          const layout = { halves: [part], labels: labels.slice(index, index + 1), hasTotal }
          return (
            <div className="card" key={index}>
              <AttendanceGrid {...props} layout={layout} />
            </div>
          )
        })}
      </div>
    </>
  )
}
