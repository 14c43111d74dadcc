// What is built and how: Vite settings of the page and of the command line. They read no vite.config.ts, which is for the
// development server, so that a build depends on nothing but these lines.
import { readFileSync } from 'node:fs';
import { join, relative } from 'node:path';

/** Fails the build when a package is bundled that is no dependency: what ships must be named, with its licence. */
const onlyDependencies = (root) => ({
  name: 'only-dependencies',
  generateBundle(_options, bundle) {
    const { packages } = JSON.parse(readFileSync(join(root, 'package-lock.json'), 'utf8'));
    for (const chunk of Object.values(bundle)) {
      for (const id of chunk.moduleIds ?? []) {
        const path = relative(root, id).match(/^node_modules\/(@[^/]+\/)?[^/]+/)?.[0];
        if (path && packages[path]?.dev) this.error(`${path} is bundled but a development dependency`);
      }
    }
  },
});

// A slow machine is no fault of the sources.
const checks = { pluginTimings: false };

const common = (root) => ({
  root,
  configFile: false,
  envDir: false,
  mode: 'production',
  logLevel: 'warn',
  plugins: [onlyDependencies(root)],
});

/** The viewer's page: relative addresses, nothing inline, hashed assets. */
export const pageBundle = (root, outDir) => ({
  ...common(root),
  base: './',
  publicDir: join(root, 'public'),
  build: {
    outDir,
    emptyOutDir: true,
    target: 'es2022',
    // The content policy allows no data: address but for pictures.
    assetsInlineLimit: 0,
    modulePreload: { polyfill: false },
    reportCompressedSize: false,
    rolldownOptions: { checks },
    // three alone is above the default of 500 kB.
    chunkSizeWarningLimit: 1500,
  },
});

/** The command line: one module a command, packages included, so that it runs without node_modules. */
export const terminalBundle = (root, outDir) => ({
  ...common(root),
  publicDir: false,
  // The plain build of msgpackr: its Node entry looks for a compiled add-on at start-up.
  resolve: { alias: [{ find: /^msgpackr$/, replacement: join(root, 'node_modules/msgpackr/index.js') }] },
  ssr: { noExternal: true },
  build: {
    ssr: join(root, 'viewer/terminal/main.ts'),
    outDir,
    emptyOutDir: true,
    target: 'node20',
    minify: false,
    rolldownOptions: {
      checks,
      output: { entryFileNames: '[name].mjs', chunkFileNames: '[name]-[hash].mjs' },
    },
  },
});
