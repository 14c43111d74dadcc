// Bundles the benchmarks as the command line is bundled, since unbundled modules call each other at half the speed, and
// runs them. usage: node test/bench/run.mjs [part ...]
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';

const root = fileURLToPath(new URL('../..', import.meta.url));
await build({
  root,
  configFile: false,
  logLevel: 'error',
  build: {
    ssr: 'test/bench/main.ts',
    outDir: 'dist/bench',
    emptyOutDir: true,
    target: 'node20',
    rollupOptions: { output: { entryFileNames: 'main.mjs' } },
  },
});
const run = spawnSync(process.execPath, [`${root}/dist/bench/main.mjs`, ...process.argv.slice(2)], {
  stdio: 'inherit',
  cwd: root,
});
process.exit(run.status ?? 1);
