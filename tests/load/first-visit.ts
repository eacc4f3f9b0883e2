import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join, resolve } from 'node:path'
import { gzipSync } from 'node:zlib'
import react from '@vitejs/plugin-react'
import { build, type Manifest } from 'vite'
import { find, type Finding } from './rounds'

const PAGE = 'apps/web/src/clinics/academy.page.tsx'

/** The JavaScript that a first visit to a public page loads, against that of the libraries alone. */
export async function measureFirstVisit(): Promise<Finding> {
  const folder = mkdtempSync(join(tmpdir(), 'marram-bench-'))
  try {
    const app = join(folder, 'app')
    await build({ logLevel: 'error', build: { outDir: app, emptyOutDir: true } })
    const bare = join(folder, 'bare')
    await build({
      configFile: false,
      logLevel: 'error',
      publicDir: false,
      plugins: [react()],
      build: {
        outDir: bare,
        target: 'es2022',
        manifest: true,
        rolldownOptions: { input: resolve('tests/load/bare-page/main.tsx') },
      },
    })
    return find({
      name: 'JavaScript of a first visit, the libraries alone',
      unit: 'kB gzip',
      ours: kilobytes(app, [...scriptsOf(app, ['index.html', PAGE]), ...scriptsInHead(app)]),
      floor: kilobytes(bare, scriptsOf(bare, ['tests/load/bare-page/main.tsx'])),
      goal: { at: 'most', ratio: 1.3 },
    })
  } finally {
    rmSync(folder, { recursive: true })
  }
}

/** The files of these entries and of all that they import, which is what the browser preloads. */
function scriptsOf(folder: string, entries: readonly string[]): string[] {
  // The bundler wrote it.
  const manifest = JSON.parse(
    readFileSync(join(folder, '.vite', 'manifest.json'), 'utf8'),
  ) as Manifest
  const files = new Set<string>()
  const visit = (key: string): void => {
    const chunk = manifest[key]
    if (!chunk) throw new Error(`The build has no ${key}.`)
    if (files.has(chunk.file)) return
    files.add(chunk.file)
    chunk.imports?.forEach(visit)
  }
  entries.forEach(visit)
  return [...files].filter((file) => file.endsWith('.js'))
}

/** Scripts that the page's HTML asks for besides the bundler's. */
function scriptsInHead(folder: string): string[] {
  const html = readFileSync(join(folder, 'index.html'), 'utf8')
  const sources = [...html.matchAll(/<script src="\/([^"]+)"/g)]
  return sources.flatMap(([, source]) => (source && !source.startsWith('assets/') ? [source] : []))
}

function kilobytes(folder: string, files: readonly string[]): number {
  const bytes = files.map((file) => gzipSync(readFileSync(join(folder, file))).length)
  return bytes.reduce((sum, size) => sum + size, 0) / 1000
}
