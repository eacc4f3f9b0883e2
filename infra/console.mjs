/** Says what goes on, one line a step; long steps show that they move. */
export function say(line) {
  process.stdout.write(`  ${line}\n`)
}

/** Runs a long step with a line that grows a dot every few seconds. */
export async function step(title, work) {
  const began = Date.now()
  process.stdout.write(`  ${title} `)
  const timer = setInterval(() => process.stdout.write('.'), 3_000)
  try {
    const result = await work()
    process.stdout.write(` ${((Date.now() - began) / 1000).toFixed(1)} s\n`)
    return result
  } catch (error) {
    process.stdout.write(' failed\n')
    throw error
  } finally {
    clearInterval(timer)
  }
}
