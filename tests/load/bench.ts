import { makeDatabases } from './database'
import { measureExpansion } from './expansion'
import { fillDatabase } from './fill'
import { measureFirstVisit } from './first-visit'
import { measureHoldsInProcess, measureHoldsOverHttp } from './holds'
import { measurePublicPage } from './public-page'
import type { Finding } from './rounds'
import { asTable } from './table'
import { prepareForHolds } from './wishes'

const GOLFERS = 40

const isForMachines = process.argv.includes('--json')

/** Ratios of the product to floors measured in the same run; `--json` gives them to machines. */
async function main(): Promise<void> {
  const findings = [...(await measureWithDatabases())]
  say('Expanding recurrences')
  findings.push(measureExpansion())
  say('Weighing a first visit')
  findings.push(await measureFirstVisit())
  const answer = isForMachines ? JSON.stringify({ findings }, null, 2) : asTable(findings)
  process.stdout.write(`${answer}\n`)
}

async function measureWithDatabases(): Promise<Finding[]> {
  const { databases, drop } = await makeDatabases(['one', 'many', 'holds'])
  try {
    say('Filling databases with 1 and with 1,000 academies')
    await fillDatabase(databases.one, { academies: 1, golfers: GOLFERS })
    await fillDatabase(databases.holds, { academies: 1, golfers: GOLFERS })
    await fillDatabase(databases.many, { academies: 1_000, golfers: GOLFERS })
    say('Asking for the public page')
    const pages = await measurePublicPage(databases)
    say('Holding places')
    const wishes = await prepareForHolds(databases.holds)
    const inProcess = await measureHoldsInProcess(databases.holds, wishes)
    return [...pages, inProcess, ...(await measureHoldsOverHttp(databases.holds, wishes))]
  } finally {
    await drop()
  }
}

function say(text: string): void {
  if (!isForMachines) process.stderr.write(`${text}\n`)
}

await main()
