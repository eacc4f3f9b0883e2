/** SQL for an instant as JavaScript writes it: "2031-04-01T17:00:00.000Z". */
export const isoInstant = (column: string): string =>
  `to_char(${column} AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`
