import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

/** The client build. `npm run build` puts it where the web process serves it from: dist/web. */
export default defineConfig({
  root: import.meta.dirname,
  plugins: [react(), tailwindcss()],
  build: {
    outDir: '../dist/web',
    emptyOutDir: true,
    // No data: addresses, so that the content security policy can stay at 'self'.
    assetsInlineLimit: 0,
    target: 'es2022',
  },
  worker: { format: 'es' },
  server: { proxy: { '/api': 'http://127.0.0.1:8080', '/auth': 'http://127.0.0.1:8080', '/schema/': { target: 'http://127.0.0.1:8080', bypass: (request) => (/\.json(\?|$)/.test(request.url ?? '') ? undefined : request.url) } } },
});
