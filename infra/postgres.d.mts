export interface RunningPostgres {
  /** The address of a database, as the cluster's superuser. */
  url(database: string): string
  port: number
  bin: string
  stop(): Promise<unknown>
}

export function ensurePostgres(options: {
  folder: string
  say: (line: string) => void
}): Promise<RunningPostgres>

export function aptInstall(packages: string[]): Promise<void>
