import { defineConfig } from 'vite'

/** The API's processes, bundled with the workspace packages for a quick start in production. */
export default defineConfig({
  build: {
    ssr: true,
    outDir: 'dist/api',
    target: 'node20',
    sourcemap: true,
    rolldownOptions: {
      input: {
        main: 'apps/api/src/main.ts',
        worker: 'apps/api/src/worker.ts',
        manage: 'apps/api/src/manage.ts',
        fakes: 'packages/fakes/src/run.ts',
      },
    },
  },
  ssr: { noExternal: [/^@marram\//] },
  publicDir: false,
})
