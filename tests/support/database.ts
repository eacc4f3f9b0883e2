import { inject } from 'vitest'
import { copyDatabase, type TestDatabase } from './copy-database'

export type { TestDatabase }

/** A database of one's own for a test file, copied from the template that the run has made. */
export function takeDatabase(): Promise<TestDatabase> {
  return copyDatabase({
    superuserUrl: inject('superuserUrl'),
    databasePort: inject('databasePort'),
    template: inject('template'),
  })
}
