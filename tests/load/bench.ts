import { makeDatabases } from './database'
import { measureExpansion } from './expansion'
import { fillDatabase } from './fill'
import { measurePublicPage } from './public-page'
import type { Finding } from './rounds'
import { asTable } from './table'

/** Ratios of the product to floors measured in the same run; `--json` gives them to machines. */
async function main(): Promise<void> {
  const isForMachines = process.argv.includes('--json')
  const say = (text: string) => {
    if (!isForMachines) process.stderr.write(`${text}\n`)
  }
  const findings: Finding[] = []
  say('Expanding recurrences')
  findings.push(measureExpansion())
  say('Filling databases with 1 and with 1,000 academies')
  const { databases, drop } = await makeDatabases(['one', 'many'])
  try {
    await fillDatabase(databases.one, { academies: 1, golfers: 40 })
    await fillDatabase(databases.many, { academies: 1_000, golfers: 40 })
    say('Asking for the public page')
    findings.push(...(await measurePublicPage(databases)))
  } finally {
    await drop()
  }
  const answer = isForMachines ? JSON.stringify({ findings }, null, 2) : asTable(findings)
  process.stdout.write(`${answer}\n`)
}

await main()
