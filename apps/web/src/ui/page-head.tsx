import type { ReactNode } from 'react'

/** The head of a staff page: title, one line of fact, actions at the right. */
export function PageHead(props: {
  crumb?: ReactNode
  title: ReactNode
  sub?: ReactNode
  actions?: ReactNode
}) {
  return (
    <div className="head">
      <div>
        {props.crumb && <p className="crumb">{props.crumb}</p>}
        <h1>{props.title}</h1>
      </div>
      {props.sub && <p className="sub">{props.sub}</p>}
      {props.actions && <div className="acts">{props.actions}</div>}
    </div>
  )
}
