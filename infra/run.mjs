import { spawn } from 'node:child_process'

/**
 * Runs a program to its end and gives back what it printed.
 * Rejects with an Error that carries `stdout` and `stderr` when the exit code is not 0.
 */
export function run(program, args, { as, cwd, env, input, stdio = 'pipe' } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, {
      cwd: cwd ?? (as ? '/' : process.cwd()),
      env: env ?? process.env,
      stdio: stdio === 'inherit' ? ['ignore', 'inherit', 'inherit'] : 'pipe',
      ...(as ? { uid: as.uid, gid: as.gid } : {}),
    })
    let stdout = ''
    let stderr = ''
    child.stdout?.on('data', (chunk) => (stdout += chunk))
    child.stderr?.on('data', (chunk) => (stderr += chunk))
    child.on('error', reject)
    child.on('close', (code) => {
      if (code === 0) return resolve({ stdout, stderr })
      const failure = new Error(`${program} ended with ${code}: ${stderr.trim() || stdout.trim()}`)
      reject(Object.assign(failure, { code, stdout, stderr }))
    })
    child.stdin?.on('error', () => {})
    child.stdin?.end(input ?? '')
  })
}
