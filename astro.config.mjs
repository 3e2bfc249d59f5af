import { defineConfig, passthroughImageService } from 'astro/config';
import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';

export default defineConfig({
  output: 'server',
  // Without streaming a page that fails half-way is an error page, not half a page.
  adapter: node({ mode: 'standalone', experimentalDisableStreaming: true }),
  integrations: [react()],
  image: { service: passthroughImageService() },
  devToolbar: { enabled: false },
  // Every unsafe call is held to the site's own Origin by the middleware, JSON too, and refused as problem details; the
  // framework's check knows forms only and answers in plain text. Any host is let in here: the middleware knows the right one.
  security: { checkOrigin: false, allowedDomains: [{}] },
  experimental: {
    csp: {
      algorithm: 'SHA-256',
      directives: [
        "default-src 'self'",
        "img-src 'self' data: blob:",
        "font-src 'self'",
        "connect-src 'self'",
        "worker-src 'self'",
        "object-src 'none'",
        "base-uri 'none'",
        "form-action 'self'",
        "frame-ancestors 'none'",
      ],
    },
  },
  vite: { plugins: [tailwindcss()], build: { assetsInlineLimit: 0 } },
});
