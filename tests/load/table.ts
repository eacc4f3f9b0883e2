import type { Finding } from './rounds'

/** The findings for a reader: one line each, in columns. */
export function asTable(findings: readonly Finding[]): string {
  const head = ['measured', 'ours', 'floor', '', 'ratio', 'goal', '']
  const rows = findings.map(({ name, unit, ours, floor, ratio, goal, isMet }) => [
    name,
    figures(ours),
    figures(floor),
    unit,
    ratio.toFixed(2),
    `${goal.at === 'least' ? '≥' : '≤'} ${goal.ratio}`,
    isMet ? 'met' : 'NOT MET',
  ])
  const lines = [head, ...rows]
  const widths = head.map((_, column) =>
    Math.max(...lines.map((line) => line[column]?.length ?? 0)),
  )
  const isNumber = (column: number) => column === 1 || column === 2 || column === 4
  return lines
    .map((line) =>
      line
        .map((cell, at) =>
          isNumber(at) ? cell.padStart(widths[at] ?? 0) : cell.padEnd(widths[at] ?? 0),
        )
        .join('  ')
        .trimEnd(),
    )
    .join('\n')
}

/** Three significant figures, and no fractions of what is counted in hundreds. */
function figures(value: number): string {
  return value >= 100 ? Math.round(value).toLocaleString('en-IE') : value.toPrecision(3)
}
