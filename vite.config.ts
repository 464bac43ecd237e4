// Builds the browser's part (dist/client) and the same pages for the server (dist/server).
import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

export default defineConfig({
  plugins: [tailwindcss(), react()],
  // Everything public is imported and gets a hash in its name; there is no folder of loose files.
  publicDir: false,
  build: {
    // A site that is running goes on with the files it was started with.
    emptyOutDir: false,
    // A data: address is refused by the content security policy for fonts, and is never cached apart.
    assetsInlineLimit: 0,
  },
});
