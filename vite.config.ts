import { defineConfig } from 'vite';

// The development server alone: `npx vite` serves the page from its sources and follows changes. What ships is built by
// viewer/terminal/build.mjs, whose settings stand in bundles.mjs and depend on no file like this one.
export default defineConfig({
  base: './',
  server: { host: '127.0.0.1' },
});
