import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'

const SOON_MS = 300

/** Keeps a stand-in's state in a file, so that it survives a restart as the database does. */
export interface KeptState {
  /** Writes soon; many changes at once are written together. */
  keep: () => void
  /** Writes now, at the end. */
  flush: () => void
}

/** What was kept before, as it was written; undefined where nothing was. */
export function readKept(file: string | undefined): unknown {
  return file && existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : undefined
}

export function keepState(file: string | undefined, snapshot: () => unknown): KeptState {
  let timer: NodeJS.Timeout | undefined
  const write = () => {
    timer = undefined
    if (!file) return
    mkdirSync(dirname(file), { recursive: true })
    // Written beside and moved into place: a kill in between leaves the old state whole.
    writeFileSync(`${file}.new`, JSON.stringify(snapshot()))
    renameSync(`${file}.new`, file)
  }
  return {
    keep() {
      if (file) timer ??= setTimeout(write, SOON_MS)
    },
    flush() {
      clearTimeout(timer)
      write()
    },
  }
}
