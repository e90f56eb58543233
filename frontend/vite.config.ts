import tailwind from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vite';

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));
const api = { target: `http://127.0.0.1:${process.env['PORT'] ?? '3000'}` };

/** Each group is a file of its own, so that pages load charts and forms only where they show them. */
const CODE_GROUPS = [
  { name: 'react', test: /node_modules[\\/](react|react-dom|scheduler)[\\/]/ },
  { name: 'router', test: /node_modules[\\/](react-router|react-router-dom|@tanstack)[\\/]/ },
  { name: 'forms', test: /node_modules[\\/](zod|@hookform|react-hook-form|@standard-schema)[\\/]/ },
  { name: 'decimal', test: /node_modules[\\/]decimal\.js[\\/]/ },
  { name: 'charts', test: /node_modules[\\/](chart\.js|@kurkle)[\\/]/ },
];

export default defineConfig({
  root: here('.'),
  plugins: [react(), tailwind()],
  build: {
    outDir: here('../dist/web'),
    emptyOutDir: true,
    rolldownOptions: { output: { codeSplitting: { groups: CODE_GROUPS } } },
  },
  worker: { format: 'es' },
  server: {
    host: '127.0.0.1',
    port: Number(process.env['WEB_PORT'] ?? 5173),
    strictPort: true,
    // Without this list the dev server hands out every file of the project, the database password in .local included.
    fs: { allow: ['src', 'public', 'index.html', '../common/src', '../node_modules'].map(here) },
    proxy: { '/api': api, '/health': api },
  },
});
