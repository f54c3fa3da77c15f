import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

const apiPort = process.env['PORT'] ?? '4600';

export default defineConfig({
  plugins: [react(), tailwindcss()],
  build: { outDir: 'dist/client', target: 'es2022', chunkSizeWarningLimit: 700 },
  server: {
    host: '127.0.0.1',
    proxy: { '/api': { target: `http://127.0.0.1:${apiPort}`, changeOrigin: false } },
  },
});
