import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vite';

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

/** The server as one file with source map; packages stay outside it, in node_modules. */
export default defineConfig({
  root: here('.'),
  publicDir: false,
  build: {
    ssr: true,
    outDir: here('../dist/server'),
    emptyOutDir: true,
    target: 'node20',
    sourcemap: true,
    minify: false,
    rolldownOptions: { input: { main: here('src/main.ts') }, output: { entryFileNames: '[name].js' } },
  },
});
