import { defineConfig, passthroughImageService } from 'astro/config';
import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';

export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'standalone' }),
  integrations: [react()],
  image: { service: passthroughImageService() },
  devToolbar: { enabled: false },
  security: { checkOrigin: true, allowedDomains: [{ hostname: '**' }] },
  experimental: { csp: { algorithm: 'SHA-256' } },
  vite: { plugins: [tailwindcss()], build: { assetsInlineLimit: 0 } },
});
