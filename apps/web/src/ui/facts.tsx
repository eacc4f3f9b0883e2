import { Fragment, type ReactNode } from 'react'

/** A ruled list of facts: "When", "Tuesdays, 17:45–18:45". Facts of nothing are left out. */
export function Facts({
  facts,
}: {
  facts: readonly (readonly [label: string, value: ReactNode])[]
}) {
  return (
    <dl className="dl">
      {facts
        .filter(([, value]) => value !== null && value !== '' && value !== false)
        .map(([label, value]) => (
          <Fragment key={label}>
            <dt>{label}</dt>
            <dd>{value}</dd>
          </Fragment>
        ))}
    </dl>
  )
}

/** What something costs, line by line, the total last. */
export function Bill({
  lines,
}: {
  lines: readonly (readonly [what: ReactNode, amount: string])[]
}) {
  return (
    <table className="bill">
      <tbody>
        {lines.map(([what, amount], index) => (
          <tr key={index}>
            <td>{what}</td>
            <td>{amount}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
