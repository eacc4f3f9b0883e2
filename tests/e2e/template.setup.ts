import { makeTemplate } from '../support/template'

/** Makes the migrated database once; each server of the run takes a copy of it. */
export default async function setup(): Promise<void> {
  process.env['MARRAM_TEST_TEMPLATE'] = JSON.stringify(await makeTemplate())
}
